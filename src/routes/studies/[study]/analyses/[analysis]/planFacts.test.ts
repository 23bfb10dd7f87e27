import { describe, expect, it } from 'vitest';
import { planSchema } from '#lib/contracts/plan.ts';
import { planFacts } from './planFacts.ts';

const plan = planSchema.parse({ treeSet: 't', tree: 0, overlapRun: 'o', seed: 23, permutations: 99_999 });

describe('planFacts', () => {
	it('tells shuffles and seed as they were asked', () => {
		const told = [
			{ term: 'Shuffles', fact: '99,999' },
			{ term: 'Seed', fact: '23' }
		];
		expect(planFacts(plan).slice(-2)).toEqual(told);
		expect(planFacts(plan, { exact: false, count: 99_999 }).slice(-2)).toEqual(told);
	});

	it('tells of an exact test what was counted, and no seed, for none was used', () => {
		const facts = planFacts(plan, { exact: true, count: 40_320 }); // 8!, every relabelling of eight species
		expect(facts.at(-1)).toEqual({ term: 'Shuffles', fact: 'all 40,320 relabellings (99,999 asked for)' });
		expect(facts.map(({ term }) => term)).not.toContain('Seed');
	});
});
