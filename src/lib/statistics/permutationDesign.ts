import { InputError } from '#lib/remarks/inputError.ts';
import { type AgedTree, treeShape, type TreeShape } from './agedTree.ts';
import type { Group } from './arrangements.ts';
import { assertAllFinite } from './assertAllFinite.ts';
import { assertOverlap } from './assertOverlap.ts';
import {
	ALWAYS_COUNTED,
	type CountedStatistic,
	type Functional,
	type FunctionalInput,
	functionalsOf,
	PERMUTATION_STATISTICS,
	type PermutationStatistic,
	weightingsOf
} from './functionals.ts';
import { assertAgesVary, assertOverlapsVary } from './linearRegression.ts';
import { midRanks } from './midRanks.ts';
import { pairBlocks } from './pairBlocks.ts';
import { lowerTriangle, symmetricMatrix } from './pairValues.ts';

export { PERMUTATION_STATISTICS, type PermutationStatistic } from './functionals.ts';

/** A tree and a matrix made ready for arranging: all that the runs read, nothing they change. */
export type PermutationDesign = FunctionalInput & {
	readonly shape: TreeShape;
	/** `slope-log-age` is absent where an internal node has age 0 */
	readonly functionals: readonly Functional[];
	/** all positions in one group: every species may stand anywhere */
	readonly free: readonly Group[];
	/** the daughters of the root with two species or more: species change places within them only */
	readonly within: readonly Group[];
	/** species in each daughter of the root, in tree order */
	readonly sides: readonly number[];
	/** share of all pairs that meet at the root */
	readonly rootPairShare: number;
};

export type DesignInput = {
	/** see `AgedTree`; a pair's age is that of the node where it meets */
	readonly tree: AgedTree;
	/** shape (n, n), row-major, tips in tree order; a similarity */
	readonly overlap: Float64Array;
	/** what is counted beside the slope and the node averages; all that there is unless told otherwise */
	readonly statistics?: readonly PermutationStatistic[];
};

/**
 * Prepares the test of "niches are exchangeable among species, given the tree". The null moves species over tips: rows
 * and columns of the matrix together, never single pairs.
 *
 * @throws {InputError} `constant-ages`, `constant-overlap`, `non-finite`, `asymmetric`; `too-few-species` below 3
 */
export function preparePermutation({ tree, overlap, statistics = PERMUTATION_STATISTICS }: DesignInput): PermutationDesign {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	assertOverlap(overlap, tipCount);
	const layout = pairBlocks(shape);
	const slotAges = Float64Array.from(shape.internal, (node) => tree.ages[node] ?? Number.NaN);
	const overlaps = lowerTriangle(overlap, tipCount);
	assertTestable(slotAges, overlaps, tipCount);
	// Ranking two million pairs takes longer than the rest of the design.
	const ranks = statistics.includes('spearman') ? symmetricMatrix(midRanks(overlaps), tipCount, 0) : null;
	const input = { layout, overlap, ranks, tipCount };
	const counted: readonly CountedStatistic[] = [...ALWAYS_COUNTED, ...statistics];
	const weightings = weightingsOf(slotAges, input).filter(({ statistic }) => counted.includes(statistic));
	return { ...input, shape, functionals: functionalsOf(input, weightings), ...groupsOf(shape, layout.pairs) };
}

function assertTestable(slotAges: Float64Array, overlaps: Float64Array, tipCount: number): void {
	if (tipCount < 3) {
		throw new InputError('too-few-species', `Expected at least 3 species: fewer have a single pair; got ${tipCount}.`);
	}
	assertAllFinite(slotAges, 'node age');
	assertAgesVary(slotAges);
	assertOverlapsVary(overlaps);
}

function groupsOf(shape: TreeShape, pairs: Float64Array) {
	const { tips, tipFrom, tipTo, children } = shape;
	const daughters = (children[0] ?? []).map((child) => ({ from: tipFrom[child] ?? 0, to: tipTo[child] ?? 0 }));
	return {
		free: [{ from: 0, to: tips.length }],
		within: daughters.filter(({ from, to }) => to - from > 1),
		sides: daughters.map(({ from, to }) => to - from),
		rootPairShare: (pairs[0] ?? 0) / ((tips.length * (tips.length - 1)) / 2)
	};
}
