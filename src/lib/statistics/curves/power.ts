import { type AgedTree, treeShape } from '../agedTree.ts';
import { arrangementCount, type Group, identityArrangement, nextArrangementInPlace, shuffleInPlace } from '../arrangements.ts';
import { type Functional, PERMUTATION_STATISTICS, type PermutationStatistic, weightedSum } from '../functionals.ts';
import { type NodeSumsInput, nodeSumsOfBatch } from '../nodeSums.ts';
import { lowerTriangle, symmetricMatrix } from '../pairValues.ts';
import { preparePermutation } from '../permutationDesign.ts';
import { type RandomStream, randomStream, STREAM_DOMAIN } from '../randomStream.ts';
import { tabulatedOverlap } from './gaussianOverlap.ts';
import { centreDistance, centreWalker } from './walkedNiches.ts';

/** A random walk of niche centres: θ at the root, and the number of niche axes. */
export type WalkTruth = { readonly theta: number; readonly axes: number };

/**
 * The truths whose detection is told: fixed beforehand, never the fitted effect, whose "observed power" only repeats p.
 * @see Hoenig & Heisey (2001), doi:10.1198/000313001300339897
 */
export const POWER_TRUTHS: readonly WalkTruth[] = [1, 2].flatMap((axes) => [0.25, 1, 4].map((theta) => ({ theta, axes })));

export type PowerOptions = {
	readonly truths: readonly WalkTruth[];
	/** one-sided level */
	readonly alpha: number;
	readonly simulations: number;
	readonly shuffles: number;
	readonly seed: number;
};

export type Power = {
	/** one entry a truth */
	readonly rows: readonly { readonly statistic: PermutationStatistic; readonly power: readonly number[] }[];
	/** largest of all entries */
	readonly standardError: number;
};

/** Draws the overlaps of one simulated clade, shape (n, n), row-major. */
export type OverlapDraw = (stream: RandomStream) => Float64Array;

/**
 * How often each statistic would find a random walk of niche centres along this tree: Schoener's D of Gaussian niches of
 * one width, species shuffled freely, overlap falling with age as the alternative. All statistics judge the same walks
 * and the same shuffles, so their differences are surer than each.
 *
 * Cost: truths · simulations · shuffles visits of every pair.
 */
export function statisticPower(tree: AgedTree, options: PowerOptions): Power {
	const walkCentres = centreWalker(tree, treeShape(tree));
	const overlapAt = tabulatedOverlap('schoener-d');
	const rootAge = tree.ages[0] ?? 1;
	const draws = options.truths.map(({ theta, axes }): OverlapDraw => {
		const rate = (2 * theta) / rootAge;
		return (stream) => {
			const centres = walkCentres({ axes, rate }, stream);
			const { tipCount } = centres;
			const overlap = new Float64Array(tipCount * tipCount).fill(1);
			for (let i = 1; i < tipCount; i++) {
				for (let j = 0; j < i; j++) {
					const value = overlapAt(centreDistance(centres, i, j));
					overlap[i * tipCount + j] = value;
					overlap[j * tipCount + i] = value;
				}
			}
			return overlap;
		};
	});
	const shares = draws.map((draw, i) => rejectionShares(tree, draw, { ...options, firstChunk: i * options.simulations }));
	const statistics = [...(shares[0]?.keys() ?? [])];
	const rows = statistics.map((statistic) => ({ statistic, power: shares.map((share) => share.get(statistic) ?? 0) }));
	const errors = rows.flatMap(({ power }) => power.map((share) => Math.sqrt((share * (1 - share)) / options.simulations)));
	return { rows, standardError: Math.max(...errors) };
}

export type RejectionOptions = Pick<PowerOptions, 'alpha' | 'simulations' | 'shuffles' | 'seed'> & {
	/** first of as many chunks of the stream as there are simulations */
	readonly firstChunk: number;
	/** species change places within the daughters of the root only */
	readonly within?: boolean;
};

/**
 * Share of drawn matrices in which each statistic's lower tail is at most alpha: p = (b + 1) / (m + 1), or exact where all
 * arrangements are no more than the shuffles.
 */
export function rejectionShares(
	tree: AgedTree,
	draw: OverlapDraw,
	{ alpha, simulations, shuffles, seed, firstChunk, within = false }: RejectionOptions
): Map<PermutationStatistic, number> {
	const tipCount = treeShape(tree).tips.length;
	// Weights hang on the tree alone; of the matrix they only need that it varies, and of ranks only their scale does not.
	const design = preparePermutation({ tree, overlap: unlikeOverlap(tipCount) });
	const tested = design.functionals.filter(isTested);
	const groups = within ? design.within : design.free;
	const isExact = arrangementCount(groups) <= shuffles;
	const count = isExact ? arrangementCount(groups) : shuffles + 1;
	const arrangements = new Int32Array(count * tipCount);
	if (isExact) arrangeAllInPlace(arrangements, { groups, tipCount });
	const most = Math.floor(alpha * count + ROUNDING) - 1;
	const rejected = tested.map(() => 0);
	for (let simulation = 0; simulation < simulations; simulation++) {
		const stream = randomStream(seed, firstChunk + simulation, STREAM_DOMAIN.power);
		const overlap = draw(stream);
		if (!isExact) arrangeInPlace(arrangements, stream, { groups, tipCount });
		const counts = lowerTails({ ...design, overlap }, tested, arrangements);
		for (const [i, asLow] of counts.entries()) if (asLow <= most) rejected[i] = (rejected[i] ?? 0) + 1;
	}
	return new Map(tested.map(({ statistic }, i) => [statistic, (rejected[i] ?? 0) / simulations]));
}

type Tested = Functional & { readonly statistic: PermutationStatistic };

function isTested(functional: Functional): functional is Tested {
	return PERMUTATION_STATISTICS.some((statistic) => statistic === functional.statistic);
}

/** The identity, then shuffles, each going on from the one before. */
function arrangeInPlace(
	arrangements: Int32Array,
	stream: RandomStream,
	{ groups, tipCount }: { readonly groups: readonly Group[]; readonly tipCount: number }
): void {
	const arrangement = identityArrangement(tipCount);
	for (let from = 0; from < arrangements.length; from += tipCount) {
		if (from > 0) for (const group of groups) shuffleInPlace(arrangement, stream, group);
		arrangements.set(arrangement, from);
	}
}

/** All arrangements, the identity first. */
function arrangeAllInPlace(
	arrangements: Int32Array,
	{ groups, tipCount }: { readonly groups: readonly Group[]; readonly tipCount: number }
): void {
	const arrangement = identityArrangement(tipCount);
	for (let from = 0; from < arrangements.length; from += tipCount) {
		arrangements.set(arrangement, from);
		nextArrangementInPlace(arrangement, groups);
	}
}

/** Of each functional, the arrangements after the first whose value is as low as the first's; ties count. */
function lowerTails({ layout, overlap, tipCount }: NodeSumsInput, tested: readonly Tested[], arrangements: Int32Array): number[] {
	const ranks = symmetricMatrix(drawnRanks(lowerTriangle(overlap, tipCount)), tipCount, 0);
	const slots = layout.pairs.length;
	const batch = { count: arrangements.length / tipCount, arrangements };
	const sums = nodeSumsOfBatch({ layout, overlap, tipCount }, batch);
	const sources = { ...sums, ranks: nodeSumsOfBatch({ layout, overlap: ranks, tipCount }, batch).plain };
	return tested.map(({ weights, source }) => {
		const all = sources[source];
		const own = weightedSum(weights, all);
		const tie = TIE * weightedSum(weights.map(Math.abs), all);
		let count = 0;
		for (let from = slots; from < all.length; from += slots) {
			let value = 0;
			for (let slot = 0; slot < slots; slot++) value += (weights[slot] ?? 0) * (all[from + slot] ?? 0);
			if (value <= own + tie) count++;
		}
		return count;
	});
}

/** Mid-ranks of drawn numbers, which tie only where they are equal: a few hundred of them, thousands of times. */
function drawnRanks(values: Float64Array): Float64Array {
	const sorted = Float64Array.from(values).sort();
	const ranks = new Map<number, number>();
	for (let from = 0, to = 0; from < sorted.length; from = to) {
		while (to < sorted.length && sorted[to] === sorted[from]) to++;
		ranks.set(sorted[from] ?? 0, (from + to + 1) / 2);
	}
	return values.map((value) => ranks.get(value) ?? 0);
}

/** Share of Σ|o w| within which values tie, as in the test itself: symmetric arrangements differ by rounding only. */
const TIE = 1e-10;
/** alpha (m + 1) is meant to be whole; 0.05 · 200 falls on either side of 10. */
const ROUNDING = 1e-9;

/** Any matrix whose overlaps differ. */
function unlikeOverlap(count: number): Float64Array {
	const pairs = (count * (count - 1)) / 2;
	return symmetricMatrix(
		Array.from({ length: pairs }, (_, pair) => pair / pairs),
		count,
		1
	);
}
