import { describe, expect, it } from 'vitest';
import { analyse } from '#lib/analysis/analyse.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import { findingsView } from './findingsView.ts';

const result = analyse(
	{
		treeText: '((a:1,b:1):2,((c:0.5,d:0.5):1,e:1.5):1.5);',
		ageUnit: 'Ma',
		spreadConfirmed: false,
		measure: 'schoener-d',
		overlap: {
			species: ['a', 'b', 'c', 'd', 'e'],
			lower: Float64Array.of(0.9, 0.2, 1 / 3, 0.1, 0.2, 0.8, 0.3, 0.1, 0.6, 0.5),
			remarks: []
		},
		decisions: []
	},
	planSchema.parse({ treeSet: 't', overlapRun: 'r', tree: 0, seed: 1, permutations: 99 })
);

describe('findingsView', () => {
	const view = findingsView(result);

	// By property: the numbers a reader sees are those of the result; only what is drawn is shortened, to 7 digits.
	it('keeps every number of the tests and shortens only what is drawn', () => {
		expect(view.permutation).toEqual(result.permutation);
		expect(view.regression).toEqual(result.regression);
		for (const [index, value] of view.plate.overlapLower.entries())
			expect(value).toBeCloseTo(result.plate.overlapLower[index] ?? Number.NaN, 6);
	});

	it('leaves the species of every node behind', () => {
		expect(JSON.stringify(view.nodeAverages)).not.toContain('children');
		expect(view.nodeAverages.nodes).toHaveLength(4);
	});

	it('holds the caption written for the result', () => {
		expect(view.caption).toContain('5 species');
	});
});
