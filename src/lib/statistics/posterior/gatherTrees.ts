import { InputError } from '#lib/remarks/inputError.ts';
import type { AgedTree } from '../agedTree.ts';
import type { PermutationStatistic } from '../functionals.ts';
import { type CladeAge, cladeAges, cladeCollector, collectCladesInPlace } from './cladeAges.ts';
import { nodeScores } from './nodeScores.ts';
import { addPairWeightsInPlace, foldPairsInPlace } from './pairWeights.ts';
import { layTreeInPlace, roomForTree, type PosteriorTree } from './posteriorTree.ts';
import { commonestSplit, countRootSplitInPlace, type RootSplit } from './rootSplits.ts';
import { overlapFacts, treeLine } from './treeLine.ts';

/** One statistic averaged over trees, as a weight of every pair. */
export type AveragedStatistic = {
	readonly statistic: PermutationStatistic;
	/** shape (n, n), row-major, symmetric, diagonal 0; the mean over trees of scores that are free of the trees' scales */
	readonly weights: Float64Array;
	/** mean over trees of 1 / spread: turns the scale-free mean into a slope where every tree weighs the same */
	readonly perSpread: number;
};

/** What a set of trees says together. */
export type GatheredTrees = {
	readonly count: number;
	readonly averaged: readonly AveragedStatistic[];
	/** shape (trees,) each: lines of overlap on age over all pairs, and ages of the roots */
	readonly slopes: Float64Array;
	readonly intercepts: Float64Array;
	readonly r: Float64Array;
	readonly rootAges: Float64Array;
	readonly clades: readonly CladeAge[];
	/** the commonest root split; `sideOf` has shape (n,), by row of the matrix */
	readonly deepestSplit: { readonly sideOf: Int32Array; readonly share: number };
};

export type Gathering = {
	/** trees of the same species; `where` names a tree in a message */
	readonly trees: Iterable<PosteriorTree>;
	/** the tree that is drawn; rows of the matrix stand in its order */
	readonly displayed: AgedTree;
	/** shape (n, n), row-major, symmetric, not constant */
	readonly overlap: Float64Array;
	readonly tipCount: number;
	readonly statistics: readonly PermutationStatistic[];
	/** how a tree is called in a message, by its place in `trees` */
	readonly nameOf: (index: number) => string;
};

/**
 * Reads every tree once and keeps sums only: per statistic one weight of every pair, per tree one line and one root age.
 * Each tree's ages are divided by their own spread before the mean is taken, M = (1/B) Σ (T - mean T) / sqrt(SS T), so that
 * a tree dated twice as old weighs no more and no less. Cost per tree: its n(n-1)/2 pairs, once per statistic and once for
 * the line; no n x n memory per tree.
 *
 * @throws {InputError} `no-trees`; what `nodeScores` refuses, with the name of the tree
 */
export function gatherTrees(gathering: Gathering): GatheredTrees {
	const { trees, displayed, overlap, tipCount, statistics, nameOf } = gathering;
	const facts = overlapFacts(overlap, tipCount);
	const sums = statistics.map((statistic) => ({ statistic, weights: new Float64Array(tipCount ** 2), perSpread: 0 }));
	const clades = cladeCollector(displayed, tipCount);
	const splits: RootSplit[] = [];
	const lines: { slope: number; intercept: number; r: number; rootAge: number }[] = [];
	const laid = roomForTree(tipCount);
	for (const tree of trees) {
		layTreeInPlace(laid, tree);
		try {
			const ofSlope = nodeScores('slope', laid);
			for (const sum of sums) {
				const { scores, spread } = sum.statistic === 'slope' ? ofSlope : nodeScores(sum.statistic, laid);
				addPairWeightsInPlace(sum.weights, laid, { statistic: sum.statistic, scores });
				sum.perSpread += 1 / spread;
			}
			lines.push({ ...treeLine(facts, laid, ofSlope), rootAge: tree.ages[0] ?? 0 });
		} catch (thrown) {
			throw named(thrown, nameOf(lines.length));
		}
		collectCladesInPlace(clades, laid);
		countRootSplitInPlace(splits, laid);
	}
	const count = lines.length;
	if (count === 0) throw new InputError('no-trees', 'Expected at least 1 tree to average over; got 0.');
	for (const { weights } of sums) foldPairsInPlace(weights, tipCount, 1 / count);
	const commonest = commonestSplit(splits);
	return {
		count,
		averaged: sums.map(({ perSpread, ...sum }) => ({ ...sum, perSpread: perSpread / count })),
		slopes: Float64Array.from(lines, ({ slope }) => slope),
		intercepts: Float64Array.from(lines, ({ intercept }) => intercept),
		r: Float64Array.from(lines, ({ r }) => r),
		rootAges: Float64Array.from(lines, ({ rootAge }) => rootAge),
		clades: cladeAges(clades, count),
		deepestSplit: { sideOf: commonest.sideOf, share: commonest.count / count }
	};
}

/** A fault of one tree among many says which. */
function named(thrown: unknown, name: string): unknown {
	if (!(thrown instanceof InputError)) return thrown;
	return new InputError(thrown.code, `In ${name}: ${thrown.message}`, thrown.where, { cause: thrown });
}
