import type { EventEmitter } from 'node:events';
import { randomUUID } from 'node:crypto';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { RunningAnalysis } from '#lib/server/heldRuntime.ts';
import { describeError, log } from '#lib/server/log.ts';
import { systemAccess } from '#lib/server/systemAccess.ts';
import type { AnalysisEvent } from './analysisEvents.ts';
import type { AnalysisFailure, AnalysisStore } from './analysisStore.ts';
import * as heartbeat from './heartbeat.ts';
import { joinProgress } from './joinProgress.ts';
import { ANALYSES, MOST_ATTEMPTS, type AnalysisJob, type JobQueue } from './queue.ts';
import { shareAnalysis } from './shareAnalysis.ts';

export type AnalysisWorker = {
	/** analyses that run in this process */
	readonly running: ReadonlyMap<string, RunningAnalysis>;
	/** takes waiting jobs now instead of at the next look */
	readonly wake: () => void;
	/** marks the analysis as stopped and ends its run in this process, if it is here */
	readonly stop: (id: string) => Promise<void>;
	/** puts interrupted analyses back in the queue; every one that is marked as working with `all` */
	readonly recover: (scope: { readonly all: boolean }) => Promise<void>;
	/** takes no more jobs, gives running ones back to the queue, waits until that is done */
	readonly close: () => Promise<void>;
};

type Parts = {
	readonly queue: JobQueue;
	readonly store: AnalysisStore;
	readonly progress: EventEmitter;
	/** analyses at the same time */
	readonly capacity: number;
};
type Job = { readonly id: string; readonly data: AnalysisJob };

/** How often a process looks for jobs that another process has queued. */
const LOOK_EVERY_MS = 2_000;
const SAVE_EVERY_MS = 1_000;
const WITHOUT_JOB_AFTER_MS = 30_000;
const access = systemAccess('analysis worker');

/** Takes jobs from the queue and runs them on the compute threads, a few at a time. */
export function openAnalysisWorker(parts: Parts): AnalysisWorker {
	const running = new Map<string, RunningAnalysis>();
	const runs = new Set<Promise<void>>();
	const state = { isClosing: false, isTaking: false, isWoken: false };

	const begin = (job: Job) => {
		const run = runJob(job, { ...parts, running, isClosing: () => state.isClosing }).catch((thrown: unknown) =>
			log('error', 'analysis-job', { job: job.id, ...describeError(thrown) })
		);
		runs.add(run);
		void run.finally(() => {
			runs.delete(run);
			wake();
		});
	};
	const take = async () => {
		while (!state.isClosing && runs.size < parts.capacity) {
			const [job] = await parts.queue.boss.fetch<AnalysisJob>(ANALYSES);
			if (job === undefined) return;
			begin(job);
		}
	};
	const wake = () => {
		state.isWoken = true;
		if (state.isTaking || state.isClosing) return;
		state.isTaking = true;
		taking = takeWhileWoken(state, take).finally(() => (state.isTaking = false));
	};
	let taking: Promise<void> = Promise.resolve();

	const recoverLost = (scope: { readonly all: boolean }) => recover(parts, running, scope).then(wake);
	const timers = [
		setInterval(wake, LOOK_EVERY_MS),
		setInterval(() => void recoverLost({ all: false }).catch(logLost), heartbeat.REAP_EVERY_MS)
	];
	for (const timer of timers) timer.unref();

	const stop = async (id: string) => {
		await parts.store.markStopped(access, id);
		running.get(id)?.stop.abort();
	};
	const close = async () => {
		state.isClosing = true;
		for (const timer of timers) clearInterval(timer);
		await taking;
		for (const run of running.values()) run.stop.abort();
		await Promise.all(runs);
	};
	return { running, wake, stop, recover: recoverLost, close };
}

async function takeWhileWoken(state: { isWoken: boolean }, take: () => Promise<void>): Promise<void> {
	while (state.isWoken) {
		state.isWoken = false;
		await take().catch((thrown: unknown) => log('error', 'queue-fetch', describeError(thrown)));
	}
}

function logLost(thrown: unknown): void {
	log('error', 'analysis-recovery', describeError(thrown));
}

type Surroundings = Parts & { readonly running: Map<string, RunningAnalysis>; readonly isClosing: () => boolean };

async function runJob(job: Job, around: Surroundings): Promise<void> {
	const id = job.data.analysisId;
	const { store, queue, running } = around;
	if (!(await store.markWorking(access, id))) {
		await queue.boss.complete(ANALYSES, job.id);
		return;
	}
	const run: RunningAnalysis = { id, stop: new AbortController(), latest: null };
	running.set(id, run);
	const beating = setInterval(() => void keepAlive(run), heartbeat.BEAT_MS);
	let end: AnalysisEvent | null;
	try {
		end = await runAnalysis(run, around);
	} finally {
		clearInterval(beating);
		if (running.get(id) === run) running.delete(id);
	}
	if (end === null && around.isClosing()) await giveBack(job, around);
	if (end !== null) around.progress.emit(id, end);
	await queue.boss.complete(ANALYSES, job.id);
}

async function keepAlive(run: RunningAnalysis): Promise<void> {
	try {
		if (!(await heartbeat.beat(run.id))) run.stop.abort();
	} catch (thrown) {
		log('warning', 'heartbeat', { analysis: run.id, ...describeError(thrown) });
	}
}

/** How the analysis ended; null when it was stopped or interrupted, which is on record already or recorded by the caller. */
async function runAnalysis(run: RunningAnalysis, { store, progress }: Surroundings): Promise<AnalysisEvent | null> {
	const saving = { at: 0 };
	const onProgress = (message: AnalysisProgress) => {
		run.latest = joinProgress(run.latest, message);
		progress.emit(run.id, { type: 'progress', progress: message } satisfies AnalysisEvent);
		if (Date.now() - saving.at < SAVE_EVERY_MS) return;
		saving.at = Date.now();
		store.saveProgress(access, run.id, run.latest).catch((thrown: unknown) => log('warning', 'progress', describeError(thrown)));
	};
	try {
		const { inputs, plan } = await store.inputsOf(access, run.id);
		const result = await shareAnalysis({ inputs, plan }, { onProgress, signal: run.stop.signal });
		await store.markFinished(access, run.id, result);
		return { type: 'finished' };
	} catch (thrown) {
		if (run.stop.signal.aborted) return null;
		const failure = failureOf(thrown, run.id);
		await store.markFailed(access, run.id, failure);
		return { type: 'failed', failure };
	}
}

function failureOf(thrown: unknown, analysis: string): AnalysisFailure {
	if (thrown instanceof InputError) return { code: thrown.code, message: thrown.message };
	const reference = randomUUID();
	log('error', 'analysis-failed', { analysis, reference, ...describeError(thrown) });
	const message = `The program failed while it worked on this analysis; your data are unchanged. Run it again, and tell us reference ${reference} if it fails again.`;
	return { code: 'program-failed', message, reference };
}

/** The program is closing: the next one starts this analysis again, from the same seed. An orderly end is no failed attempt. */
async function giveBack(job: Job, { queue }: Surroundings): Promise<void> {
	if (await heartbeat.returnToWaiting(job.data.analysisId)) await queue.send(job.data);
}

async function recover(
	parts: Parts,
	running: ReadonlyMap<string, RunningAnalysis>,
	{ all }: { readonly all: boolean }
): Promise<void> {
	for (const id of await heartbeat.silentFor(all ? 0 : heartbeat.STALE_AFTER_MS)) {
		if (!running.has(id)) await recoverOne(parts, id);
	}
	for (const id of await heartbeat.waitingWithoutJob(all ? 0 : WITHOUT_JOB_AFTER_MS)) {
		await parts.queue.send({ analysisId: id, attempt: 1 });
	}
}

async function recoverOne({ queue, store, progress }: Parts, id: string): Promise<void> {
	const attempt = await heartbeat.closeLostJobs(id);
	if (attempt < MOST_ATTEMPTS) {
		if (await heartbeat.returnToWaiting(id)) await queue.send({ analysisId: id, attempt: attempt + 1 });
		return;
	}
	const message = `The program ended ${attempt} times while it worked on this analysis, perhaps for want of memory. Try fewer species, trees or permutations.`;
	const failure = { code: 'interrupted-too-often', message };
	await store.markFailed(access, id, failure);
	progress.emit(id, { type: 'failed', failure } satisfies AnalysisEvent);
}
