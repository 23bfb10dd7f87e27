import { describe, expect, it } from 'vitest';
import { planSchema } from '#lib/contracts/plan.ts';
import { renewals } from './renewals.ts';

const plan = (treeSet: string, overlapRun: string, seed = 1) => planSchema.parse({ treeSet, overlapRun, tree: 0, seed });
const made = (id: string, day: number, more: object = {}) => ({
	...{ id, plan: plan('t1', 'r1'), hash: `hash ${id}`, status: 'finished' as const, createdAt: `2026-05-0${day}` },
	...more
});
const material = (id: string, replaces: string | null = null) => ({ id, replaces });
const MATERIALS = [material('t1'), material('r1'), material('r2', 'r1'), material('r3', 'r2')];

// By hand: r3 took the place of r2, which took the place of r1.
describe('renewals', () => {
	it('pairs a run on a replacement with the run before it', () => {
		const asked = [made('old', 1), made('new', 2, { plan: plan('t1', 'r2') })];
		expect(renewals(asked, MATERIALS)).toEqual([{ before: 'old', after: 'new' }]);
	});

	it('pairs the newest of a line with the one before it, not with the first', () => {
		const asked = [made('first', 1), made('third', 3, { plan: plan('t1', 'r3') }), made('second', 2, { plan: plan('t1', 'r2') })];
		expect(renewals(asked, MATERIALS)).toEqual([{ before: 'second', after: 'third' }]);
	});

	it('follows what an analysis allowed for, and its table of niche positions', () => {
		const lines = [...MATERIALS, material('c2', 'c1'), material('n2', 'n1')];
		const asking = (covariate: string, table: string) => ({
			plan: { ...plan('t1', 'r1'), covariates: [covariate], signal: { variables: ['warmth'], table } }
		});
		const asked = [made('old', 1, asking('c1', 'n1')), made('new', 2, asking('c2', 'n2')), made('other', 3, asking('c9', 'n2'))];
		expect(renewals(asked, lines)).toEqual([{ before: 'old', after: 'new' }]);
	});

	it('pairs two runs of one plan between which decisions about names changed', () => {
		expect(renewals([made('old', 1), made('new', 2)], MATERIALS)).toEqual([{ before: 'old', after: 'new' }]);
	});

	it('pairs with the last that has a result, and leaves out a plan that was only declared or was stopped', () => {
		const asked = [
			...[made('old', 1), made('broken', 2, { status: 'failed', plan: plan('t1', 'r2') })],
			...[made('waits', 3, { status: 'waiting', plan: plan('t1', 'r3') }), made('declared', 4, { status: 'stopped' })]
		];
		expect(renewals(asked, MATERIALS)).toEqual([{ before: 'old', after: 'waits' }]);
	});

	it('does not pair plans that ask something else, nor materials that stand side by side', () => {
		const other = [made('a', 1), made('b', 2, { plan: plan('t1', 'r1', 2) }), made('c', 3, { plan: plan('t1', 'r9') })];
		expect(renewals(other, [...MATERIALS, material('r9')])).toEqual([]);
	});

	it('puts what was asked for last first', () => {
		const asked = [
			...[made('old', 1), made('new', 2, { plan: plan('t1', 'r2') })],
			...[made('old too', 1, { plan: plan('t1', 'r1', 2) }), made('new too', 3, { plan: plan('t1', 'r2', 2) })]
		];
		expect(renewals(asked, MATERIALS).map(({ after }) => after)).toEqual(['new too', 'new']);
	});
});
