import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { planRequestSchema } from '#lib/contracts/plan.ts';
import { treeSetRequestSchema } from '#lib/contracts/materials.ts';
import { declareAnalysis, startAnalysis } from '#lib/server/api/startAnalysis.ts';
import { watchAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { can, type Access } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { CSV, TREE } from './api/materials.ts';
import { startPeople, type People } from './api/people.ts';
import { openTestRuntime, type TestRuntime } from './support/openTestRuntime.ts';

let runtime: TestRuntime;
let people: People;

beforeAll(async () => {
	runtime = await openTestRuntime();
	people = await startPeople();
});
afterAll(() => runtime.close());

/** A study of the lab with a tree and a matrix that a script brought, which nobody has looked at. */
async function unopened() {
	const made = await studies.create(await can(people.lead.user, 'create', { lab: people.lab }), { title: 'Rock doves' });
	const lead = await can(people.lead.user, 'delete', { study: made.id });
	const analyst = await can(people.analyst.user, 'run', { study: made.id });
	const treeSet = await treeSets.create(lead, treeSetRequestSchema.parse({ label: 'Tree', text: TREE }));
	const run = await overlapRuns.create(lead, { label: 'Overlap', measure: 'schoener-d', csv: CSV });
	const plan = planRequestSchema.parse({ treeSet: treeSet.id, overlapRun: run.id, seed: 5 });
	return { lead, analyst, run, plan };
}

const opened = async (access: Access) =>
	(await logBook.ofStudy(access)).filter(({ action }) => action === 'overlap-run.opened').length;

// By property: what a plan may claim to have been stated before.
describe('openings', () => {
	it('are written down once a person and run, and not for a visitor without an account', async () => {
		const { lead, analyst, run } = await unopened();
		await openings.note(lead, run, 'page');
		await openings.note(lead, run, 'file');
		await openings.note(analyst, run, 'script');
		await openings.note({ ...lead, userId: null }, run, 'page');
		expect(await opened(lead)).toBe(2);
		expect(await openings.contextOf(lead, run.id)).toMatchObject({ opened: { by: 'page' }, openedByOthers: 1 });
		expect(await openings.contextOf(analyst, run.id)).toMatchObject({ opened: { by: 'script' }, openedByOthers: 1 });
	});

	it('of later do not reach a plan that stood before them', async () => {
		const { analyst, run, plan } = await unopened();
		const declared = await declareAnalysis(analyst, plan);
		await openings.note(analyst, run, 'page');
		const started = await startAnalysis(analyst, plan);
		expect(started.id).toBe(declared.id);
		for await (const event of watchAnalysis(started.id)) if (event.type !== 'progress') break;
		const first = await analyses.find(analyst, started.id);
		expect(first?.context).toEqual({ opened: null, openedByOthers: 0, analysedBefore: 0, lastAnalysed: null });
		const next = await startAnalysis(analyst, { ...plan, seed: 6 });
		const second = await analyses.find(analyst, next.id);
		expect(second?.context).toMatchObject({ opened: { by: 'page' }, analysedBefore: 1, lastAnalysed: first?.finishedAt });
	});

	it('keep a run folded in lists until the person opens it or an analysis shows it', async () => {
		const { lead, analyst, run, plan } = await unopened();
		expect((await openings.drawable(analyst, [run])).has(run.id)).toBe(false);
		expect((await openings.drawable({ ...analyst, role: 'visitor' }, [run])).has(run.id)).toBe(true);
		await openings.note(lead, run, 'page');
		expect((await openings.drawable(lead, [run])).has(run.id)).toBe(true);
		expect((await openings.drawable(analyst, [run])).has(run.id)).toBe(false);
		const { id } = await startAnalysis(analyst, plan);
		for await (const event of watchAnalysis(id)) if (event.type !== 'progress') break;
		expect((await openings.drawable(analyst, [run])).has(run.id)).toBe(true);
	});

	it('go along with a copy of the run, and of the study', async () => {
		const { lead, analyst, run } = await unopened();
		await openings.note(lead, run, 'page');
		const copied = await overlapRuns.copy(lead, run.id);
		expect((await openings.contextOf(lead, copied?.id ?? '')).opened?.by).toBe('page');
		const target = await can(people.lead.user, 'create', { lab: people.lab });
		const study = await studies.copy(lead, target, 'Rock doves (copy)');
		const inside = await can(people.lead.user, 'read', { study: study?.id ?? '' });
		const runs = await overlapRuns.list(inside);
		expect((await openings.drawable(inside, runs)).size).toBe(2);
		expect((await openings.contextOf({ ...inside, userId: analyst.userId }, runs[0]?.id ?? '')).opened).toBeNull();
	});
});
