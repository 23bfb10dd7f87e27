import { describe, expect, it } from 'vitest';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { cladesOf } from '#lib/statistics/clades/cladeList.ts';
import { testClades } from '#lib/statistics/clades/testClades.ts';
import { exampleTree } from '#lib/statistics/exampleTrees.ts';
import reference from '../../fixtures/reference/nodeAverage.json' with { type: 'json' };

/*
 * Computed independently in R 4.2.2, base packages only, on the tree and overlaps of `bird_orders23`: clades cut out of the
 * Newick text, S = mean(w[lower.tri(w)]) - mean(o[clade, -clade]), set.seed(1), 20,000 draws of sample(n) applied to rows and
 * columns; p from counting with the observed one, adjusted by rank() in every draw and the step-down minimum; beyond the
 * parent by draws of sample(length(parent)) on the parent's own rows and columns. Rows: species of the clade, difference,
 * p, adjusted p, p beyond the parent (null below the root).
 */
const CLADES: readonly (readonly [number, number, number, number, number | null])[] = [
	[5, 0.065879244444, 0.0576, 0.3279, null],
	[3, 0.1104568, 0.055, 0.3279, 0.0974],
	[18, 0.033506694771, 0.0355, 0.2521, null],
	[17, 0.045777703431, 0.0062, 0.0634, 0.0545],
	[16, 0.042722259524, 0.0093, 0.0892, 0.4102],
	[5, -0.018691088889, 0.674, 0.8452, 0.7363],
	[4, -0.002783048246, 0.5221, 0.8452, 0.6007],
	[11, 0.044827619697, 0.0185, 0.1559, 0.2213],
	[10, 0.046709968376, 0.0211, 0.1682, 0.1825],
	[9, 0.030781940476, 0.1098, 0.4401, 0.8989],
	[8, 0.011534805952, 0.3248, 0.8161, 1],
	[4, 0.014776451754, 0.3823, 0.8452, 0.572],
	[4, 0.009377061404, 0.4303, 0.8452, 0.3864],
	[3, -0.00968375, 0.5635, 0.8452, 1]
];
const SHUFFLES = 20_000;
/** Four standard errors of the difference of two shares of so many draws; 1e-4 for the digits told. */
const apart = (p: number) => 4 * Math.sqrt((2 * p * (1 - p)) / SHUFFLES) + 1e-4;

const birds = reference.cases.find(({ name }) => name === 'bird_orders23');
if (birds === undefined) throw new Error('The reference holds the tree of the bird orders.');
const tree = exampleTree(birds.newick);
const count = tree.labels.length;
const overlap = new Float64Array(count * count).fill(1);
const place = birds.tips.map((tip) => tree.labels.indexOf(tip));
let pair = 0;
for (let j = 0; j < count; j++) {
	for (let i = j + 1; i < count; i++) {
		const value = birds.overlap_lower[pair++] ?? Number.NaN;
		overlap[(place[i] ?? 0) * count + (place[j] ?? 0)] = value;
		overlap[(place[j] ?? 0) * count + (place[i] ?? 0)] = value;
	}
}

describe('clades of the bird orders', () => {
	const groups = cladesOf(treeShape(tree), 3);
	const { clades } = testClades({ tree, overlap, groups, seed: 5, permutations: SHUFFLES, alpha: 0.05 });

	it('are those of the reference, with its differences', () => {
		const found = clades.map(({ group, contrast }) => [group.members.length, contrast.difference ?? Number.NaN] as const);
		expect(found).toHaveLength(CLADES.length);
		for (const [row, [size, difference]] of found.entries()) {
			expect(size).toBe(CLADES[row]?.[0]);
			expect(difference).toBeCloseTo(CLADES[row]?.[1] ?? Number.NaN, 11);
		}
	});

	it('have its p-values within the error of both samples: free, adjusted, and beyond the parent', () => {
		for (const [row, [, , p, adjusted, beyond]] of CLADES.entries()) {
			const clade = clades[row];
			expect(Math.abs((clade?.p ?? 2) - p)).toBeLessThan(apart(p));
			expect(Math.abs((clade?.pAdjusted ?? 2) - adjusted)).toBeLessThan(apart(adjusted));
			if (beyond === null) expect(clade?.beyond?.parent).toBe(0);
			else expect(Math.abs((clade?.beyond?.p ?? 2) - beyond)).toBeLessThan(apart(beyond));
		}
	});
});
