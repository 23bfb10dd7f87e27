import { InputError } from '#lib/remarks/inputError.ts';
import { type AgedTree, treeShape, type TreeShape } from './agedTree.ts';
import { type Group, identityArrangement } from './arrangements.ts';
import { assertAllFinite } from './assertAllFinite.ts';
import { assertOverlap } from './assertOverlap.ts';
import { type BlockInput, type BlockSums, emptyBlockSums, interleave, sumBlocksInPlace } from './blockSums.ts';
import { assertAgesVary, assertOverlapsVary } from './linearRegression.ts';
import { midRanks, midRanksOfRepeated } from './midRanks.ts';
import { pairBlocks } from './pairBlocks.ts';
import { lowerTriangle, symmetricMatrix } from './pairValues.ts';

/**
 * The statistics of one arrangement: slope of overlap on age and on log2 age over pairs (Mantel's z and r, one-to-one
 * with the slope, need no counting of their own), slope of plain and of nested node averages, rank correlation.
 */
export const PERMUTATION_STATISTICS = ['slope', 'slope-log-age', 'nodes-plain', 'nodes-nested', 'spearman'] as const;
export type PermutationStatistic = (typeof PERMUTATION_STATISTICS)[number];

/** A statistic as a weighted sum over nodes, which every one of them is, being linear in the overlaps or their ranks. */
export type Functional = {
	readonly statistic: PermutationStatistic;
	readonly source: keyof BlockSums;
	/** shape (slots,) */
	readonly weights: Float64Array;
	readonly observed: number;
	/** arrangements this close to the observed one tie with it; unit of the statistic */
	readonly tie: number;
};

/** A tree and a matrix made ready for arranging: all that the runs read, nothing they change. */
export type PermutationDesign = BlockInput & {
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

/** Share of Σ|o w| within which two values are one: far above rounding (1e-13), far below any step of real data. */
const TIE_SHARE = 1e-10;

/**
 * Prepares the test of "niches are exchangeable among species, given the tree". The null moves species over tips: rows
 * and columns of the matrix together, never single pairs.
 *
 * @param tree - see `AgedTree`; the pair's age is that of the node where it meets
 * @param overlap - shape (n, n), row-major, tips in tree order; a similarity
 * @throws {InputError} `constant-ages`, `constant-overlap`, `non-finite`, `asymmetric`; `too-few-species` below 3
 */
export function preparePermutation({ tree, overlap }: { tree: AgedTree; overlap: Float64Array }): PermutationDesign {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	assertOverlap(overlap, tipCount);
	const layout = pairBlocks(shape);
	const slotAges = Float64Array.from(shape.internal, (node) => tree.ages[node] ?? Number.NaN);
	const overlaps = lowerTriangle(overlap, tipCount);
	assertTestable(slotAges, overlaps, tipCount);
	const ranks = midRanks(overlaps);
	const cells = interleave(overlap, symmetricMatrix(ranks, tipCount, 0));
	const input = { layout, cells, tipCount };
	const weightings = weightingsOf(slotAges, layout.pairs, spreadOf(ranks, new Float64Array(ranks.length).fill(1)));
	return { ...input, functionals: withObserved(input, weightings), ...groupsOf(shape, layout.pairs) };
}

function assertTestable(slotAges: Float64Array, overlaps: Float64Array, tipCount: number): void {
	if (tipCount < 3) {
		throw new InputError('too-few-species', `Expected at least 3 species: fewer have a single pair; got ${tipCount}.`);
	}
	assertAllFinite(slotAges, 'node age');
	assertAgesVary(slotAges);
	assertOverlapsVary(overlaps);
}

type Weighting = Pick<Functional, 'statistic' | 'source' | 'weights'>;

/**
 * Weights are centred, (f(age) - mean) / Sxx, so each sum is the slope itself and adding a constant to all ages changes
 * nothing. The correlation of ranks divides by the spread of both instead.
 */
function weightingsOf(ages: Float64Array, pairs: Float64Array, rankSpread: number): Weighting[] {
	const each = pairs.map(() => 1);
	const logAges = ages.map((age) => Math.log2(age));
	const ageRanks = midRanksOfRepeated(ages, pairs);
	const rankWeights = slopeWeights(ageRanks, pairs).map((w) => w * Math.sqrt(spreadOf(ageRanks, pairs) / rankSpread));
	const nodeWeights = slopeWeights(ages, each);
	const weightings: Weighting[] = [
		{ statistic: 'slope', source: 'plain', weights: slopeWeights(ages, pairs) },
		{ statistic: 'nodes-plain', source: 'plain', weights: nodeWeights.map((w, slot) => w / (pairs[slot] ?? 1)) },
		{ statistic: 'nodes-nested', source: 'nested', weights: nodeWeights },
		{ statistic: 'spearman', source: 'ranks', weights: rankWeights }
	];
	if (logAges.every(Number.isFinite)) {
		weightings.push({ statistic: 'slope-log-age', source: 'plain', weights: slopeWeights(logAges, pairs) });
	}
	return weightings;
}

/** (x - mean) / Sxx, with x counted `counts` times. */
function slopeWeights(x: Float64Array, counts: Float64Array): Float64Array {
	const mean = meanOf(x, counts);
	const spread = spreadOf(x, counts);
	return x.map((value) => (value - mean) / spread);
}

function meanOf(x: Float64Array, counts: Float64Array): number {
	let sum = 0;
	let total = 0;
	for (const [i, value] of x.entries()) {
		sum += value * (counts[i] ?? 0);
		total += counts[i] ?? 0;
	}
	return sum / total;
}

function spreadOf(x: Float64Array, counts: Float64Array): number {
	const mean = meanOf(x, counts);
	let sum = 0;
	for (const [i, value] of x.entries()) sum += (value - mean) ** 2 * (counts[i] ?? 0);
	return sum;
}

/** The observed values and ties, by the same kernel as every shuffle: so the identity always ties with itself. */
function withObserved(input: BlockInput, weightings: readonly Weighting[]): Functional[] {
	const arrangement = identityArrangement(input.tipCount);
	const slots = input.layout.pairs.length;
	const sums = emptyBlockSums(slots);
	sumBlocksInPlace(sums, input, arrangement);
	const magnitudes = emptyBlockSums(slots);
	sumBlocksInPlace(magnitudes, { ...input, cells: input.cells.map(Math.abs) }, arrangement);
	return weightings.map((weighting) => {
		const tie = TIE_SHARE * weightedSum(weighting.weights.map(Math.abs), magnitudes[weighting.source]);
		return { ...weighting, observed: weightedSum(weighting.weights, sums[weighting.source]), tie };
	});
}

/** Σ weights · sums, first slot first. */
export function weightedSum(weights: Float64Array, sums: Float64Array): number {
	let value = 0;
	for (let slot = 0; slot < weights.length; slot++) value += (weights[slot] ?? 0) * (sums[slot] ?? 0);
	return value;
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
