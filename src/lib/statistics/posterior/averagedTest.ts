import { identityArrangement, type Group } from '../arrangements.ts';
import { denseSumsOfBatch } from '../denseSums.ts';
import { midRanks } from '../midRanks.ts';
import { lowerTriangle, symmetricMatrix } from '../pairValues.ts';
import type { Functional, PermutationStatistic } from '../functionals.ts';
import { permutationPValue } from '../permutationPValue.ts';
import type { NullOutcome, PermutationOutcome, TestedStatistic } from '../permutationTest.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import { plannedArrangements, shuffleBatches, type ShuffleQuestion } from '../shuffleBatches.ts';
import type { TailCounts } from '../tally.ts';
import type { AveragedStatistic, GatheredTrees } from './gatherTrees.ts';

/** Share of Σ|o w| within which two values are one, as in `permutationDesign`. */
const TIE_SHARE = 1e-10;

export type AveragedQuestion = {
	/** shape (n, n), row-major, rows in the order of the displayed tree */
	readonly overlap: Float64Array;
	readonly tipCount: number;
	readonly gathered: Pick<GatheredTrees, 'averaged' | 'deepestSplit'>;
	/** m, at least 1 */
	readonly permutations: number;
	/** whole number in [0, 2^32) */
	readonly seed: number;
	/** called after every batch; it may throw to stop the test */
	readonly onProgress?: (progress: AveragedProgress) => void;
};

export type AveragedProgress = {
	readonly question: 'free' | 'within';
	/** arrangements of this question, so far, and of the one before it */
	readonly done: number;
	readonly before: number;
	/** arrangements of both questions together */
	readonly total: number;
	readonly counts: Readonly<Partial<Record<PermutationStatistic, TailCounts>>>;
};

export type AveragedOutcome = PermutationOutcome & {
	/** what was counted; arrangements as close as `tie` to the observed one tie with it */
	readonly functionals: readonly Pick<Functional, 'statistic' | 'observed' | 'tie'>[];
};

/**
 * One exact test over all trees of a set: the mean over trees of each statistic, under the same shuffles. Every statistic
 * is linear in the overlaps or their ranks, so its mean is Σ overlap · weight, and the test costs what one tree costs. The
 * shuffles are those of the test on a single tree with equal seed.
 *
 * Within the deepest split the groups are the sides of the commonest root split; the statistic stays the mean over all
 * trees, those with another root among them. It is exact whatever the trees, since only its own relabellings are counted.
 *
 * Values are in the unit of the statistic: slopes are those of trees brought to one spread of ages (the harmonic mean of
 * theirs), so that a set of equal trees gives the slope of one.
 */
export function averagedTest(question: AveragedQuestion): AveragedOutcome {
	const { tipCount, gathered } = question;
	const { sideOf } = gathered.deepestSplit;
	const sizes = sideSizes(sideOf);
	const order = Int32Array.from(sideOf.keys()).sort((a, b) => (sideOf[a] ?? 0) - (sideOf[b] ?? 0) || a - b);
	const inside = groupsOf(sizes).filter(({ from, to }) => to - from > 1);
	const all = (tipCount * (tipCount - 1)) / 2;
	const alone = sizes.reduce((pairs, size) => pairs + (size * (size - 1)) / 2, 0);
	const everywhere = [{ from: 0, to: tipCount }];
	const { permutations } = question;
	const before = plannedArrangements({ groups: everywhere, permutations }).count;
	const total = before + (inside.length === 0 ? 0 : plannedArrangements({ groups: inside, permutations }).count);
	const inTreeOrder = identityArrangement(tipCount);
	const { counted, ...free } = ask(question, { name: 'free', groups: everywhere, order: inTreeOrder, before: 0, total });
	const functionals = counted.map(({ statistic, observed, tie, scale }) => ({
		statistic,
		observed: observed * scale,
		tie: tie * scale
	}));
	if (inside.length === 0) return { free, within: null, functionals };
	const { exact, count, statistics, values } = ask(question, { name: 'within', groups: inside, order, before, total });
	const rootPairShare = (all - alone) / all;
	return { free, within: { exact, count, statistics, values, sides: sizes, rootPairShare }, functionals };
}

type Asked = {
	readonly name: 'free' | 'within';
	readonly groups: readonly Group[];
	readonly order: Int32Array;
	readonly before: number;
	readonly total: number;
};

/** One statistic made ready for counting: two matrices whose rows stand in the order of the question. */
type Counted = {
	readonly statistic: PermutationStatistic;
	readonly cells: Float64Array;
	readonly weights: Float64Array;
	readonly observed: number;
	readonly tie: number;
	readonly scale: number;
	less: number;
	greater: number;
	readonly values: Float64Array;
};

function ask(
	asking: AveragedQuestion,
	{ name, groups, order, before, total }: Asked
): NullOutcome & { readonly counted: readonly Counted[] } {
	const { tipCount, permutations, seed, gathered, onProgress } = asking;
	const planned = plannedArrangements({ groups, permutations });
	const domain = name === 'free' ? STREAM_DOMAIN.free : STREAM_DOMAIN.within;
	const question: ShuffleQuestion = { tipCount, groups, domain, seed, permutations };
	const counted = gathered.averaged.map((averaged) => counting(averaged, asking, { order, count: planned.count }));
	let done = 0;
	for (const batch of shuffleBatches(question)) {
		for (const one of counted) countInPlace(one, tipCount, batch);
		done += batch.count;
		onProgress?.({ question: name, done, before, total, counts: countsOf(counted) });
	}
	const statistics: Partial<Record<PermutationStatistic, TestedStatistic>> = {};
	const values: Partial<Record<PermutationStatistic, Float64Array>> = {};
	for (const { statistic, observed, scale, less, greater, values: drawn } of counted) {
		const counts = { less, greater };
		statistics[statistic] = { observed: observed * scale, ...counts, ...permutationPValue(counts, done, planned.exact) };
		values[statistic] = drawn.map((value) => value * scale);
	}
	return { exact: planned.exact, count: done, statistics, values, counted };
}

function counting(
	{ statistic, weights, perSpread }: AveragedStatistic,
	{ overlap, tipCount }: AveragedQuestion,
	{ order, count }: { order: Int32Array; count: number }
): Counted {
	const { cells, scale } = statistic === 'spearman' ? rankedCells(overlap, tipCount) : { cells: overlap, scale: perSpread };
	const arranged = { cells: reordered(cells, order), weights: reordered(weights, order), tipCount };
	const identity = { count: 1, arrangements: identityArrangement(tipCount) };
	const [observed = 0] = denseSumsOfBatch(arranged, identity);
	const magnitudes = { cells: arranged.cells.map(Math.abs), weights: arranged.weights.map(Math.abs), tipCount };
	const [magnitude = 0] = denseSumsOfBatch(magnitudes, identity);
	const values = new Float64Array(count);
	return { statistic, ...arranged, observed, tie: TIE_SHARE * magnitude, scale, less: 0, greater: 0, values };
}

/** Ranks of the pairs, and what turns their products with standard scores of ages into a correlation. */
function rankedCells(overlap: Float64Array, tipCount: number): { cells: Float64Array; scale: number } {
	const ranks = midRanks(lowerTriangle(overlap, tipCount));
	const mean = (ranks.length + 1) / 2;
	const squares = ranks.reduce((sum, rank) => sum + (rank - mean) ** 2, 0);
	return { cells: symmetricMatrix(ranks, tipCount, 0), scale: 1 / Math.sqrt(squares) };
}

function countInPlace(one: Counted, tipCount: number, batch: { first: number; count: number; arrangements: Int32Array }): void {
	const { cells, weights, observed, tie } = one;
	const sums = denseSumsOfBatch({ cells, weights, tipCount }, batch);
	for (const value of sums) {
		if (value <= observed + tie) one.less++;
		if (value >= observed - tie) one.greater++;
	}
	one.values.set(sums, batch.first);
}

function countsOf(counted: readonly Counted[]): AveragedProgress['counts'] {
	return Object.fromEntries(counted.map(({ statistic, less, greater }) => [statistic, { less, greater }]));
}

/** Rows and columns in another order. */
function reordered(matrix: Float64Array, order: Int32Array): Float64Array {
	const n = order.length;
	const turned = new Float64Array(matrix.length);
	for (let i = 0; i < n; i++) {
		const row = (order[i] ?? 0) * n;
		for (let j = 0; j < n; j++) turned[i * n + j] = matrix[row + (order[j] ?? 0)] ?? 0;
	}
	return turned;
}

function sideSizes(sideOf: Int32Array): number[] {
	const sizes: number[] = [];
	for (const side of sideOf) sizes[side] = (sizes[side] ?? 0) + 1;
	return sizes;
}

function groupsOf(sizes: readonly number[]): Group[] {
	let to = 0;
	return sizes.map((size) => ({ from: to, to: (to += size) }));
}
