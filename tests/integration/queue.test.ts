import { eq, sql } from 'drizzle-orm';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { db, transaction } from '#lib/server/db/client.ts';
import { analyses } from '#lib/server/db/schema.ts';
import { heldRuntime, runtime } from '#lib/server/heldRuntime.ts';
import { enqueueAnalysis, stopAnalysis, watchAnalysis, type AnalysisEvent } from '#lib/server/jobs/analysisJobs.ts';
import { STALE_AFTER_MS } from '#lib/server/jobs/heartbeat.ts';
import { MOST_ATTEMPTS } from '#lib/server/jobs/queue.ts';
import * as users from '#lib/server/repositories/users.ts';
import { fillStudy } from './support/fillStudy.ts';
import { openTestRuntime, type TestRuntime } from './support/openTestRuntime.ts';
import { runChild, type Child } from './support/runChild.ts';
import { SLOW_COMPUTE, slowStore, type Script } from './support/slowStore.ts';

const FEW = 5;
const MANY = 1_000_000;
const script: Script = { steps: FEW, text: '' };
let open: TestRuntime | null = null;
let child: Child | null = null;

const openSlow = async (place: { dataFolder?: string } = {}) => {
	open = await openTestRuntime({ computeFile: SLOW_COMPUTE, store: slowStore(script), ...place });
	return open;
};

/** One runtime serves every test that does not end it. */
const openOnce = async () => {
	if (open === null) await openSlow();
};

async function newAnalysis(): Promise<string> {
	const known = await users.credentialsOf('ada@lab.example');
	const id = known?.id ?? (await users.register({ email: 'ada@lab.example', name: 'Ada', passphraseHash: 'none' }));
	const holder = await users.sessionHolder(id ?? '');
	return (await fillStudy({ lab: holder?.user.ownLab ?? '', createdBy: holder?.user.id ?? '' })).analysis;
}

const rowOf = async (id: string) => (await db().select().from(analyses).where(eq(analyses.id, id)))[0];

async function watchAll(id: string): Promise<AnalysisEvent[]> {
	const events: AnalysisEvent[] = [];
	for await (const event of watchAnalysis(id)) events.push(event);
	return events;
}

async function firstProgress(id: string): Promise<void> {
	for await (const event of watchAnalysis(id)) if (event.type === 'progress') return;
}

beforeEach(() => Object.assign(script, { steps: FEW, text: '' }));
/** The one thread must be free for the next test. */
afterEach(async () => {
	for (const id of heldRuntime()?.worker.running.keys() ?? []) await stopAnalysis(id);
});
afterAll(async () => {
	child?.process.kill('SIGKILL');
	await open?.close();
});

describe('enqueueAnalysis', () => {
	beforeAll(openOnce);
	it('runs the analysis, tells its progress without losing a slope, and keeps the result', async () => {
		script.steps = 30;
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		const events = await watchAll(id);
		expect(events.at(-1)).toEqual({ type: 'finished' });
		const progress = events.flatMap((event) => (event.type === 'progress' ? [event.progress] : []));
		expect(progress.at(-1)?.done).toBe(30);
		// The thread reports one slope a step, numbered: 1 to 30.
		expect(progress.flatMap((message) => message.newSlopes)).toEqual(Array.from({ length: 30 }, (_, index) => index + 1));
		expect(await rowOf(id)).toMatchObject({ status: 'finished', result: { steps: 30 } });
	});

	it('tells at most 20 messages a second', async () => {
		script.steps = 60;
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		const start = performance.now();
		const events = await watchAll(id);
		// 50 a second are reported; one more for the first and one for the end.
		expect(events.length).toBeLessThanOrEqual((20 * (performance.now() - start)) / 1000 + 2);
	});

	it('starts within a moment, not at the next look into the queue', async () => {
		script.steps = MANY;
		const id = await newAnalysis();
		const start = performance.now();
		await enqueueAnalysis(id);
		await runtimeHas(id);
		// The queue is looked into every 2 s; a start by luck within 1 s of it is half as likely as not.
		expect(performance.now() - start).toBeLessThan(1_000);
	});

	it('is refused inside a transaction, where its row is not yet to be seen', async () => {
		const id = await newAnalysis();
		await expect(transaction(() => enqueueAnalysis(id))).rejects.toThrow('after the transaction');
	});

	it('keeps the sentence of a refusal', async () => {
		script.text = 'refuse';
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		const failure = { code: 'too-few-species', message: 'Expected 4 species; got 3.' };
		expect(await watchAll(id)).toEqual([{ type: 'failed', failure }]);
		expect(await rowOf(id)).toMatchObject({ status: 'failed', failure });
	});

	it('answers a defect of ours with a reference, not with its text', async () => {
		script.text = 'break';
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		await watchAll(id);
		const failure = (await rowOf(id))?.failure;
		expect(failure?.message).toContain(`reference ${failure?.reference}`);
		expect(failure?.message).not.toContain('secret');
	});
});

describe('stopAnalysis', () => {
	beforeAll(openOnce);
	it('ends a running analysis, tells its watchers and frees its thread for the next', async () => {
		script.steps = MANY;
		const [first, second] = [await newAnalysis(), await newAnalysis()];
		await enqueueAnalysis(first);
		await firstProgress(first);
		const watched = watchAll(first);
		await enqueueAnalysis(second);
		await stopAnalysis(first);
		expect((await watched).at(-1)).toEqual({ type: 'stopped' });
		expect((await rowOf(first))?.status).toBe('stopped');
		await firstProgress(second);
	});

	it('takes a waiting analysis out of the queue', async () => {
		script.steps = MANY;
		const [first, second] = [await newAnalysis(), await newAnalysis()];
		await enqueueAnalysis(first);
		await firstProgress(first);
		await enqueueAnalysis(second);
		await stopAnalysis(second);
		await stopAnalysis(first);
		await expect.poll(() => runtime().queue.boss.getQueueSize('analyses', { before: 'completed' }), { timeout: 10_000 }).toBe(0);
		expect((await rowOf(second))?.status).toBe('stopped');
	});
});

describe('watchAnalysis', () => {
	beforeAll(openOnce);
	it('tells the end of an analysis that is over already, and nothing of one that is not there', async () => {
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		await watchAll(id);
		expect(await watchAll(id)).toEqual([{ type: 'finished' }]);
		expect(await watchAll('not-there')).toEqual([]);
	});

	it('gives somebody who comes late every slope so far', async () => {
		script.steps = 40;
		const id = await newAnalysis();
		await enqueueAnalysis(id);
		await firstProgress(id);
		const late = (await watchAll(id)).flatMap((event) => (event.type === 'progress' ? event.progress.newSlopes : []));
		expect(late).toEqual(Array.from({ length: 40 }, (_, index) => index + 1));
	});
});

describe('an interrupted analysis', () => {
	beforeAll(openOnce);

	it('is given up with a sentence when its process died too often', async () => {
		const id = await newAnalysis();
		await interrupt(id, MOST_ATTEMPTS, new Date());
		await runtime().worker.recover({ all: true });
		expect(await rowOf(id)).toMatchObject({ status: 'failed', failure: { code: 'interrupted-too-often' } });
	});

	it('of another process is left alone while its heart beats, and taken over when it is silent', async () => {
		const id = await newAnalysis();
		await interrupt(id, 1, new Date());
		await runtime().worker.recover({ all: false });
		expect((await rowOf(id))?.status).toBe('working');
		await db()
			.update(analyses)
			.set({ heartbeatAt: new Date(Date.now() - STALE_AFTER_MS - 1_000) })
			.where(eq(analyses.id, id));
		await runtime().worker.recover({ all: false });
		expect((await watchAll(id)).at(-1)).toEqual({ type: 'finished' });
	});

	it('that never got into the queue is queued at the next start', async () => {
		const id = await newAnalysis();
		await runtime().worker.recover({ all: true });
		expect((await watchAll(id)).at(-1)).toEqual({ type: 'finished' });
	});
});

describe('an analysis whose process ends', () => {
	/** Prepares a folder with one waiting analysis, to be worked on by a child process. */
	async function prepared(): Promise<{ folder: string; id: string; child: Child }> {
		await openOnce();
		const id = await newAnalysis();
		const folder = runtime().dataFolder;
		await runtime().close();
		const started = runChild('workSlowly.ts', [folder, id]);
		child = started;
		await started.says('working');
		return { folder, id, child: started };
	}

	it('is given back on SIGTERM, within 5 s, and runs again at the next start', async () => {
		const { folder, id, child } = await prepared();
		const asked = performance.now();
		child.process.kill('SIGTERM');
		expect(await child.ended).toEqual({ code: 0, signal: null });
		expect(performance.now() - asked).toBeLessThan(5_000);
		await openSlow({ dataFolder: folder });
		expect((await watchAll(id)).at(-1)).toEqual({ type: 'finished' });
	});

	it('is found after kill -9 and runs again at the next start', async () => {
		const { folder, id, child } = await prepared();
		child.process.kill('SIGKILL');
		await child.ended;
		await openSlow({ dataFolder: folder });
		expect((await watchAll(id)).at(-1)).toEqual({ type: 'finished' });
	});
});

/** Leaves the analysis as a process that died in the middle of this attempt leaves it. */
async function interrupt(id: string, attempt: number, heartbeatAt: Date): Promise<void> {
	await db().update(analyses).set({ status: 'working', heartbeatAt }).where(eq(analyses.id, id));
	await runtime().queue.send({ analysisId: id, attempt });
	await db().execute(sql`update pgboss.job set state = 'active' where data->>'analysisId' = ${id}`);
}

async function runtimeHas(id: string): Promise<void> {
	await expect.poll(() => runtime().worker.running.has(id), { timeout: 5_000, interval: 20 }).toBe(true);
}
