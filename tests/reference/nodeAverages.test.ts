import { describe, expect, it } from 'vitest';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { exampleTree } from '#lib/statistics/exampleTrees.ts';
import { nodeAverages } from '#lib/statistics/nodeAverages.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { permutationTest } from '#lib/statistics/permutationTest.ts';
import reference from '../../fixtures/reference/nodeAverage.json' with { type: 'json' };

type Case = (typeof reference.cases)[number];

/** The overlaps of a case, stored down the columns in its own order of tips, in the order of the tree. */
function overlapOf({ tips, overlap_lower }: Case, labels: readonly string[]): Float64Array {
	const n = tips.length;
	const position = tips.map((tip) => labels.indexOf(tip));
	const values = new Float64Array(n * n).fill(1);
	let pair = 0;
	for (let j = 0; j < n; j++) {
		for (let i = j + 1; i < n; i++) {
			const value = overlap_lower[pair++] ?? Number.NaN;
			values[(position[i] ?? 0) * n + (position[j] ?? 0)] = value;
			values[(position[j] ?? 0) * n + (position[i] ?? 0)] = value;
		}
	}
	return values;
}

const SHUFFLES = 20_000;

// Computed independently in R 4.2.2 by the recursive definition, lm, and counting in C; p from 1e6 shuffles or all n!.
// The stored two-sided p is the share with |slope| at least as large, another definition than ours: not compared.
describe.each(reference.cases)('node averages of $name', (each) => {
	const tree = exampleTree(each.newick);
	const overlap = overlapOf(each, tree.labels);
	const { nodes, nested, plain } = nodeAverages(tree, overlap);
	const shape = treeShape(tree);

	it('has the reference averages at every node, found by its tips', () => {
		const byTips = new Map(
			nodes.map((average) => {
				const below = tree.labels.slice(shape.tipFrom[average.node], shape.tipTo[average.node]);
				return [[...below].sort().join(), average];
			})
		);
		expect(byTips.size).toBe(each.nodes.length);
		for (const { tips, age, nested_average, unweighted_pair_mean } of each.nodes) {
			const average = byTips.get([...tips].sort().join());
			expect(average?.age).toBeCloseTo(age, 8);
			expect(average?.nested).toBeCloseTo(nested_average, 13);
			expect(average?.plain).toBeCloseTo(unweighted_pair_mean, 13);
		}
	});

	it('has the reference lines on node age', () => {
		for (const [line, stored] of [
			[nested, each.regression_nested_average_on_age],
			[plain, each.regression_unweighted_mean_on_age]
		] as const) {
			expect(line.slope).toBeCloseTo(stored.slope, 10);
			expect(line.intercept).toBeCloseTo(stored.intercept, 10);
			expect(line.rSquared).toBeCloseTo(stored.r_squared, 10);
		}
	});

	it('has the reference tails of the nested slope', () => {
		const design = preparePermutation({ tree, overlap });
		const { free } = permutationTest(design, { permutations: SHUFFLES, seed: 1 });
		const ours = free.statistics['nodes-nested'];
		const stored = each.permutation_of_tips_on_overlap_matrix.slope;
		expect(free.exact).toBe(stored.method.startsWith('exact'));
		if (free.exact) {
			expect(free.count).toBe(stored.permutations);
			expect(ours).toMatchObject({ greater: stored.count_ge, less: stored.count_le });
			return;
		}
		const error = Math.sqrt((stored.p_lower * (1 - stored.p_lower)) / SHUFFLES) + stored.mc_se_lower;
		expect(Math.abs((ours?.pLess ?? Number.NaN) - stored.p_lower)).toBeLessThan(4 * error + 1 / SHUFFLES);
		expect(Math.abs((ours?.pGreater ?? Number.NaN) - stored.p_upper)).toBeLessThan(4 * error + 1 / SHUFFLES);
	});
});
