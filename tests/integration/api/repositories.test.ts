import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { treeSetRequestSchema, type OverlapRunRequest } from '#lib/contracts/materials.ts';
import type { Access } from '#lib/server/access.ts';
import { startAnalysis } from '#lib/server/api/startAnalysis.ts';
import { planRequestSchema } from '#lib/contracts/plan.ts';
import { watchAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import { stations } from '#lib/server/repositories/stations.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import * as texts from '#lib/server/repositories/texts.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { openTestRuntime, type TestRuntime } from '../support/openTestRuntime.ts';
import { CSV, MATRIX, SPECIES, TREE } from './materials.ts';
import { startPeople, type People } from './people.ts';

let runtime: TestRuntime;
let people: People;

beforeAll(async () => {
	runtime = await openTestRuntime();
	people = await startPeople();
});
afterAll(() => runtime.close());

const treeRequest = (more: object = {}) => treeSetRequestSchema.parse({ label: 'Tree', text: TREE, ...more });
const runRequest: OverlapRunRequest = { label: 'Overlap', measure: 'schoener-d', csv: CSV };

async function newStudy(): Promise<Access> {
	const { user } = people.lead;
	const made = await studies.create(await can(user, 'create', { lab: people.lab }), { title: 'Moss beetles' });
	return can(user, 'delete', { study: made.id });
}

async function withMaterials() {
	const access = await newStudy();
	const treeSet = await treeSets.create(access, treeRequest());
	const run = await overlapRuns.create(access, runRequest);
	return { access, treeSet, run };
}

async function finished(access: Access, treeSet: string, overlapRun: string): Promise<analyses.Analysis> {
	const { id } = await startAnalysis(access, planRequestSchema.parse({ treeSet, overlapRun }));
	for await (const event of watchAnalysis(id)) if (event.type !== 'progress') break;
	const analysis = await analyses.find(access, id);
	if (analysis?.result == null) throw new Error(`Expected a finished analysis; it is ${analysis?.status}.`);
	return analysis;
}

describe('texts', () => {
	it('gives back a text of many chunks as it came', async () => {
		// Random letters do not compress, so this is more than one chunk of 256 KiB.
		const text = `é🐸\r\n${Array.from({ length: 120_000 }, (_, i) => ((i * 2_654_435_761) % 4_294_967_296).toString(36)).join('')}`;
		const hash = await texts.store(text);
		expect(await texts.load(hash)).toBe(text);
		expect(await texts.store(text)).toBe(hash);
	});
});

describe('materials', () => {
	it('are deleted, brought back and renamed', async () => {
		const { access, treeSet, run } = await withMaterials();
		for (const [repository, id] of [
			[treeSets, treeSet.id],
			[overlapRuns, run.id]
		] as const) {
			expect(await repository.rename(access, id, 'Renamed')).toBe(true);
			expect(await repository.remove(access, id)).toBe(true);
			expect(await repository.find(access, id)).toBeNull();
			expect(await repository.list(access)).toEqual([]);
			expect(await repository.restore(access, id)).toBe(true);
			expect((await repository.find(access, id))?.label).toBe('Renamed');
		}
	});

	it('are copied with all that was read, under a label of their own', async () => {
		const { access, treeSet, run } = await withMaterials();
		const copiedTrees = await treeSets.copy(access, treeSet.id);
		const copiedRun = await overlapRuns.copy(access, run.id);
		expect(copiedTrees).toMatchObject({ label: 'Tree (copy)', textHash: treeSet.textHash, tipCount: treeSet.tipCount });
		expect(copiedRun).toMatchObject({ label: 'Overlap (copy)', lower: run.lower, species: run.species });
		expect(await treeSets.list(access)).toHaveLength(2);
		expect(await overlapRuns.copy(access, 'nothing')).toBeNull();
	});

	it('of another study are out of reach', async () => {
		const { treeSet, run } = await withMaterials();
		const elsewhere = await newStudy();
		expect(await treeSets.find(elsewhere, treeSet.id)).toBeNull();
		expect(await treeSets.remove(elsewhere, treeSet.id)).toBe(false);
		expect(await overlapRuns.rename(elsewhere, run.id, 'Mine')).toBe(false);
	});

	it('keep the bits of every overlap', async () => {
		const { access, run } = await withMaterials();
		const found = await overlapRuns.find(access, run.id);
		// by hand: strict lower triangle, row by row
		expect([...(found?.lower ?? [])]).toEqual([0.8, 0.7, 0.6, 0.4, 0.4, 0.5]);
	});

	it('close a remark once it is settled, without being sent again', async () => {
		const access = await newStudy();
		const spread = await treeSets.create(access, treeRequest({ text: TREE.replace('Ab_two:1', 'Ab_two:0.98') }));
		expect(spread.remarks.map(({ level }) => level)).toContain('settle');
		expect(await treeSets.confirmSpread(access, spread.id)).toBe(true);
		const levelled = await treeSets.find(access, spread.id);
		expect(levelled?.spreadConfirmed).toBe(true);
		expect(levelled?.remarks.map(({ level }) => level)).not.toContain('settle');

		const values = MATRIX.values.map((row) => row.map((value) => Number((1 - value).toFixed(3))));
		const csv = ['species,' + SPECIES.join(','), ...values.map((row, i) => [SPECIES[i], ...row].join(','))].join('\n');
		for (const given of [{ csv }, { matrix: { species: SPECIES, values } }]) {
			const run = await overlapRuns.create(access, { label: 'O', measure: 'schoener-d', ...given });
			expect(run.remarks.map(({ level }) => level)).toContain('settle');
			expect(await overlapRuns.settle(access, run.id, { kind: 'distance' })).toBe(true);
			const settled = await overlapRuns.find(access, run.id);
			expect(settled?.remarks.map(({ level }) => level)).not.toContain('settle');
			expect(settled?.lower[0]).toBeCloseTo(0.8, 12);
		}
	});
});

describe('names', () => {
	it('keeps withdrawn decisions as history', async () => {
		const { access } = await withMaterials();
		await names.decide(access, [{ from: 'Aa one', to: null, why: 'a hybrid' }]);
		await names.decide(access, [{ from: 'Aa one', to: null, why: 'a hybrid' }]);
		await names.withdraw(access, ['Aa one']);
		expect(await names.current(access)).toEqual([]);
		const history = await names.history(access, 'Aa one');
		expect(history.map(({ withdrawn, why }) => [withdrawn, why])).toEqual([
			[true, 'a hybrid'],
			[false, 'a hybrid']
		]);
		expect(history[0]?.decidedBy).toBe('lead');
	});
});

describe('outOfDate', () => {
	it('tells a replaced tree, a deleted matrix, changed names and a remark settled anew', async () => {
		const { access, treeSet, run } = await withMaterials();
		const analysis = await finished(access, treeSet.id, run.id);
		const codes = async () => (await analyses.outOfDate(access, analysis)).map(({ code }) => code);
		expect(await codes()).toEqual([]);
		await treeSets.rename(access, treeSet.id, 'A name changes no result');
		expect(await codes()).toEqual([]);
		await names.decide(access, [{ from: 'Aa one', to: 'Aa one', why: 'seen' }]);
		expect(await codes()).toEqual(['names-changed']);
		await names.withdraw(access, ['Aa one']);
		await treeSets.replace(access, treeSet.id, treeRequest({ label: 'Newer' }));
		await overlapRuns.remove(access, run.id);
		expect(await codes()).toEqual(['tree-set-replaced', 'overlap-run-deleted']);
		await overlapRuns.restore(access, run.id);
		await treeSets.confirmSpread(access, treeSet.id);
		expect(await codes()).toEqual(['tree-set-replaced']);
	});
});

describe('analyses', () => {
	it('brings a deleted one back when its plan is asked for again', async () => {
		const { access, treeSet, run } = await withMaterials();
		const { id, plan } = await finished(access, treeSet.id, run.id);
		expect(await analyses.remove(access, id)).toBe(true);
		expect(await analyses.find(access, id)).toBeNull();
		expect(await startAnalysis(access, planRequestSchema.parse(plan))).toMatchObject({ id, status: 'finished' });
		expect(await analyses.find(access, id)).not.toBeNull();
	});
});

describe('reports', () => {
	it('remember that a caption was edited, and can be brought back', async () => {
		const { access, treeSet, run } = await withMaterials();
		const { id } = await finished(access, treeSet.id, run.id);
		const figure = { widthMm: 174, dpi: 600, age: 'left', palette: 'kithline', typeSizePt: 7 } as const;
		const report = await reports.create(access, id, { title: 'R', notes: '', figure });
		if (report === null) throw new Error('Expected a report; got none.');
		expect(report.captionEdited).toBe(false);
		await reports.update(access, report.id, { caption: 'In our words.' });
		expect(await reports.find(access, report.id)).toMatchObject({ title: 'R', caption: 'In our words.', captionEdited: true });
		await reports.remove(access, report.id);
		expect(await reports.list(access)).toEqual([]);
		await reports.restore(access, report.id);
		expect(await reports.list(access, { analysis: id })).toHaveLength(1);
	});
});

describe('stations', () => {
	it('go from not started to ready, and out of date', async () => {
		const access = await newStudy();
		const states = async () => Object.fromEntries((await stations(access)).map(({ name, state }) => [name, state]));
		expect(new Set(Object.values(await states()))).toEqual(new Set(['not-started']));
		const treeSet = await treeSets.create(access, treeRequest());
		expect(await states()).toMatchObject({ materials: 'needs-you', names: 'not-started' });
		const run = await overlapRuns.create(access, runRequest);
		expect(await states()).toMatchObject({ materials: 'ready', names: 'ready', overlaps: 'ready', analyses: 'not-started' });
		await finished(access, treeSet.id, run.id);
		expect(await states()).toMatchObject({ analyses: 'ready', reports: 'not-started' });
		await treeSets.replace(access, treeSet.id, treeRequest());
		expect(await states()).toMatchObject({ analyses: 'out-of-date' });
	});
});

describe('studies', () => {
	it('copies materials and decisions into the lab of whoever copies', async () => {
		const { access } = await withMaterials();
		await names.decide(access, [{ from: 'Aa one', to: null }]);
		const target = await can(people.analyst.user, 'create', { lab: people.analyst.user.ownLab });
		const made = await studies.copy(access, target, 'My copy');
		if (made === null) throw new Error('Expected a copy; got none.');
		const copy = await can(people.analyst.user, 'change', { study: made.id });
		expect(made).toMatchObject({ title: 'My copy', labId: people.analyst.user.ownLab, isExample: false });
		expect(await treeSets.list(copy)).toHaveLength(1);
		expect(await overlapRuns.list(copy)).toHaveLength(1);
		expect((await names.current(copy)).map(({ from }) => from)).toEqual(['Aa one']);
	});

	it('are deleted for everybody and brought back by a lead', async () => {
		const { access } = await withMaterials();
		const study = access.studyId ?? '';
		expect(await studies.remove(access)).toBe(true);
		await expect(can(people.lead.user, 'read', { study })).rejects.toMatchObject({ status: 404 });
		expect(await studies.restore(await can(people.lead.user, 'restore', { study }))).toBe(true);
		expect(await studies.find(await can(people.lead.user, 'read', { study }))).not.toBeNull();
	});
});

describe('the log book', () => {
	it('holds what was done, in a chain that is whole', async () => {
		const { access, treeSet, run } = await withMaterials();
		await finished(access, treeSet.id, run.id);
		await treeSets.remove(access, treeSet.id);
		const actions = (await logBook.ofStudy(access)).map(({ action }) => action).reverse();
		expect(actions).toEqual([
			'study.made',
			'tree-set.added',
			'overlap-run.added',
			'analysis.asked-for',
			'analysis.started',
			'analysis.finished',
			'tree-set.deleted'
		]);
		expect(await logBook.firstBrokenEntry()).toBeNull();
	});
});
