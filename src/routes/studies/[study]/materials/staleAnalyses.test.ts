import { describe, expect, it } from 'vitest';
import { planSchema } from '#lib/contracts/plan.ts';
import { staleAnalyses } from './staleAnalyses.ts';

const plan = (treeSet: string, overlapRun: string, seed = 1) => planSchema.parse({ treeSet, overlapRun, tree: 0, seed });
const material = (id: string, replaces: string | null = null, deletedAt: string | null = null) => ({ id, replaces, deletedAt });
const GONE = '2026-01-01T00:00:00.000Z';

// Expected lists by hand.
describe('staleAnalyses', () => {
	it('names no analysis whose materials still stand', () => {
		expect(staleAnalyses([{ id: 'a', plan: plan('t1', 'r1') }], [material('t1'), material('r1')])).toEqual([]);
	});

	it('gives the plan with what took the place, through several replacements and on both sides', () => {
		const materials = [
			material('t1', null, GONE),
			material('t2', 't1', GONE),
			material('t3', 't2'),
			material('r1', null, GONE),
			material('r2', 'r1')
		];
		expect(staleAnalyses([{ id: 'a', plan: plan('t1', 'r1') }], materials)).toEqual([
			{ id: 'a', renewed: plan('t3', 'r2'), through: ['t3', 'r2'] }
		]);
	});

	it('leaves out what was run again already, and keeps what was asked with another seed', () => {
		const materials = [material('t1', null, GONE), material('t2', 't1'), material('r1')];
		const asked = [
			{ id: 'old', plan: plan('t1', 'r1') },
			{ id: 'new', plan: plan('t2', 'r1') },
			{ id: 'other', plan: plan('t1', 'r1', 2) }
		];
		const stale = staleAnalyses(asked, materials);
		expect(stale.map(({ id }) => id)).toEqual(['other']);
		// Only the tree was replaced; the run it is tested with is not at fault.
		expect(stale[0]?.through).toEqual(['t2']);
	});

	it('lists nothing where the new material was deleted too', () => {
		const materials = [material('t1', null, GONE), material('t2', 't1', GONE), material('r1')];
		expect(staleAnalyses([{ id: 'a', plan: plan('t1', 'r1') }], materials)).toEqual([]);
	});

	it('follows a covariate that was replaced, and lists nothing where it is gone', () => {
		const allowing = (covariates: string[]) => ({ ...plan('t1', 'r1'), covariates });
		const standing = [material('t1'), material('r1'), material('c1', null, GONE), material('c2', 'c1'), material('c3')];
		expect(staleAnalyses([{ id: 'a', plan: allowing(['c3', 'c1']) }], standing)).toEqual([
			{ id: 'a', renewed: allowing(['c3', 'c2']), through: ['c2'] }
		]);
		const gone = [material('t1'), material('r1'), material('c1', null, GONE)];
		expect(staleAnalyses([{ id: 'a', plan: allowing(['c1']) }], gone)).toEqual([]);
	});

	it('follows a niche table that was replaced', () => {
		const asking = (table: string) => ({ ...plan('t1', 'r1'), signal: { variables: ['warmth'], table } });
		const standing = [material('t1'), material('r1'), material('n1', null, GONE), material('n2', 'n1')];
		expect(staleAnalyses([{ id: 'a', plan: asking('n1') }], standing)).toEqual([
			{ id: 'a', renewed: asking('n2'), through: ['n2'] }
		]);
	});
});
