import { midRanksOfRepeated } from './midRanks.ts';
import { type NodeSums, type NodeSumsInput, nodeSumsOfBatch } from './nodeSums.ts';
import { nodeSumsByLoop } from './nodeSumsByLoop.ts';
import type { PairBlocks } from './pairBlocks.ts';

/**
 * The statistics of one arrangement: slope of overlap on age and on log2 age over pairs (Mantel's z and r, one-to-one
 * with the slope, need no counting of their own), slope of plain and of nested node averages, rank correlation.
 */
export const PERMUTATION_STATISTICS = ['slope', 'slope-log-age', 'nodes-plain', 'nodes-nested', 'spearman'] as const;
export type PermutationStatistic = (typeof PERMUTATION_STATISTICS)[number];

/** At the level of nodes the intercept is a test of its own: the mean of the node averages changes with the shuffle. */
export const NODE_INTERCEPTS = ['nodes-plain-intercept', 'nodes-nested-intercept'] as const;
export const COUNTED_STATISTICS = [...PERMUTATION_STATISTICS, ...NODE_INTERCEPTS] as const;
export type CountedStatistic = (typeof COUNTED_STATISTICS)[number];

/** Counted in every test, whatever was asked. */
export const ALWAYS_COUNTED: readonly CountedStatistic[] = ['slope', 'nodes-plain', 'nodes-nested', ...NODE_INTERCEPTS];

/** A statistic as a weighted sum over nodes, which every one of them is, being linear in the overlaps or their ranks. */
export type Functional = {
	readonly statistic: CountedStatistic;
	/** what is summed at each node: overlaps, their nested averages, or ranks of overlaps */
	readonly source: 'plain' | 'nested' | 'ranks';
	/** shape (slots,) */
	readonly weights: Float64Array;
	readonly observed: number;
	/** arrangements this close to the observed one tie with it; unit of the statistic */
	readonly tie: number;
};

/** The matrices that functionals are sums of; ranks only where they are asked for. */
export type FunctionalInput = {
	readonly layout: PairBlocks;
	/** shape (n, n), row-major, tips in tree order */
	readonly overlap: Float64Array;
	/** the same of the mid-ranks of the pairs */
	readonly ranks: Float64Array | null;
	readonly tipCount: number;
};

/** Share of Σ|o w| within which two values are one: far above rounding (1e-13), far below any step of real data. */
const TIE_SHARE = 1e-10;

type Weighting = Pick<Functional, 'statistic' | 'source' | 'weights'> & {
	/** weights whose sum of magnitudes the tie is a share of, where they are not the weights */
	readonly tieWeights?: Float64Array;
};

/**
 * Weights are centred, (f(age) - mean) / Sxx, so each sum is the slope itself and adding a constant to all ages changes
 * nothing. The correlation of ranks divides by the spread of both instead.
 *
 * @param ages - shape (slots,); `slope-log-age` is left out where one is 0
 */
export function weightingsOf(ages: Float64Array, { layout, ranks }: FunctionalInput): Weighting[] {
	const { pairs } = layout;
	const nodes = nodeWeightings(ages, pairs);
	const slope = slopeWeights(ages, pairs);
	const tieWeights = ages.map((age) => age / spreadOf(ages, pairs));
	const weightings: Weighting[] = [{ statistic: 'slope', source: 'plain', weights: slope, tieWeights }, ...nodes];
	const logAges = ages.map((age) => Math.log2(age));
	if (logAges.every(Number.isFinite)) {
		weightings.push({ statistic: 'slope-log-age', source: 'plain', weights: slopeWeights(logAges, pairs) });
	}
	if (ranks !== null) {
		const ageRanks = midRanksOfRepeated(ages, pairs);
		const scale = Math.sqrt(spreadOf(ageRanks, pairs) / spreadOfRanks(ranks));
		weightings.push({ statistic: 'spearman', source: 'ranks', weights: slopeWeights(ageRanks, pairs).map((w) => w * scale) });
	}
	return weightings;
}

function nodeWeightings(ages: Float64Array, pairs: Float64Array): Weighting[] {
	const each = pairs.map(() => 1);
	const slope = slopeWeights(ages, each);
	const meanAge = meanOf(ages, each);
	const intercept = slope.map((w) => 1 / ages.length - meanAge * w);
	const perPair = (weights: Float64Array) => weights.map((w, slot) => w / (pairs[slot] ?? 1));
	return [
		{ statistic: 'nodes-plain', source: 'plain', weights: perPair(slope) },
		{ statistic: 'nodes-nested', source: 'nested', weights: slope },
		{ statistic: 'nodes-plain-intercept', source: 'plain', weights: perPair(intercept) },
		{ statistic: 'nodes-nested-intercept', source: 'nested', weights: intercept }
	];
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

/** Of the pairs of a symmetric matrix of ranks; each stands in it twice, and the diagonal is 0. */
function spreadOfRanks(ranks: Float64Array): number {
	const n = Math.round(Math.sqrt(ranks.length));
	const mean = ((n * (n - 1)) / 2 + 1) / 2;
	let sum = 0;
	for (const [cell, rank] of ranks.entries()) if (cell % (n + 1) !== 0) sum += (rank - mean) ** 2;
	return sum / 2;
}

/**
 * Observed values and ties of the weightings. They have the bits of the plain loop, which has the last word on every
 * arrangement that comes near: so the identity ties with itself.
 */
export function functionalsOf(input: FunctionalInput, weightings: readonly Weighting[]): Functional[] {
	const identity = Int32Array.from({ length: input.tipCount }, (_, i) => i);
	const observed = functionalSums(input, identity, sumsOfOne);
	const magnitudes = functionalSums({ ...input, overlap: input.overlap.map(Math.abs) }, identity, sumsOfOne);
	return weightings.map(({ tieWeights, ...weighting }) => ({
		...weighting,
		observed: weightedSum(weighting.weights, observed(weighting.source)),
		tie: TIE_SHARE * weightedSum((tieWeights ?? weighting.weights).map(Math.abs), magnitudes(weighting.source))
	}));
}

/** By the compiled kernel: the same bits as the plain loop, which takes seconds on 2,000 species. */
function sumsOfOne(input: NodeSumsInput, arrangement: Int32Array): NodeSums {
	return nodeSumsOfBatch(input, { count: 1, arrangements: arrangement });
}

/** Sums by node of one arrangement, each kind made when it is asked for. */
function functionalSums(
	input: FunctionalInput,
	arrangement: Int32Array,
	sumsOf: typeof nodeSumsByLoop
): (source: Functional['source']) => Float64Array {
	const { layout, tipCount, overlap } = input;
	let ofOverlaps: NodeSums | null = null;
	return (source) => {
		if (source === 'ranks') return sumsOf({ layout, tipCount, overlap: ranksOf(input) }, arrangement).plain;
		ofOverlaps ??= sumsOf({ layout, tipCount, overlap }, arrangement);
		return ofOverlaps[source];
	};
}

/** A functional of one arrangement by the plain loop on the overlaps as they are. */
export function functionalByLoop(input: FunctionalInput, { weights, source }: Functional, arrangement: Int32Array): number {
	return weightedSum(weights, functionalSums(input, arrangement, nodeSumsByLoop)(source));
}

/** The matrix of ranks, where there is one. */
export function ranksOf({ ranks }: FunctionalInput): Float64Array {
	if (ranks === null) throw new Error('A rank statistic needs the ranks of the pairs.');
	return ranks;
}

/** Σ weights · sums, first slot first. */
export function weightedSum(weights: Float64Array, sums: Float64Array): number {
	let value = 0;
	for (let slot = 0; slot < weights.length; slot++) value += (weights[slot] ?? 0) * (sums[slot] ?? 0);
	return value;
}
