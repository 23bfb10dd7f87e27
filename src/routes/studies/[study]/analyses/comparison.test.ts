import { describe, expect, it } from 'vitest';
import { planSchema } from '#lib/contracts/plan.ts';
import { comparison, type Compared } from './comparison.ts';

const plan = planSchema.parse({ treeSet: 't', overlapRun: 'r', tree: 0, seed: 1, permutations: 9999 });
const one: Compared = {
	id: 'a',
	plan,
	tree: { label: 'summary tree', treeCount: 1, ageUnit: 'Ma' },
	run: { label: 'D', measure: 'schoener-d' },
	headline: { title: 'Overlap falls', slope: -0.0163, p: 0.0016, exact: false, count: 9999, within: null, species: 26 }
};

describe('comparison', () => {
	it('marks nothing between an analysis and itself', () => {
		expect(comparison(one, one).rows.filter(({ differs }) => differs)).toEqual([]);
	});

	// By hand: only the seed of the plan was changed, and one of the two has no result yet.
	it('marks the settings and the findings that differ', () => {
		const other: Compared = { ...one, id: 'b', plan: { ...plan, seed: 2 }, headline: null };
		const differing = comparison(one, other).rows.filter(({ differs }) => differs);
		expect(differing.map(({ term }) => term)).toEqual([
			'Seed',
			'Finding',
			'Slope',
			'p',
			'p within the deepest split',
			'Species used'
		]);
		expect(differing[0]?.facts).toEqual(['1', '2']);
	});

	it('writes a slope with its unit and p with its sign', () => {
		const facts = comparison(one, one).rows.map(({ facts: [fact] }) => fact);
		expect(facts).toContain('−0.0163 per Myr');
		expect(facts).toContain('p = 0.0016');
	});
});
