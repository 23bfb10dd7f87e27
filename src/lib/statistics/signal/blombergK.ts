import type { AgedTree } from '../agedTree.ts';
import { monteCarloError, permutationPValue } from '../permutationPValue.ts';
import { nextNormal, randomStream, STREAM_DOMAIN } from '../randomStream.ts';
import { plannedArrangements, shuffleBatches } from '../shuffleBatches.ts';
import { pruneTraits } from './pruneTraits.ts';
import { brownianTree, type TraitTree } from './traitTree.ts';

/** A tie of K in the count of shuffles: relative, far above rounding. */
const TIE = 1e-10;

export type KTest = {
	/** 1 is what a random walk gives on average */
	readonly k: number;
	/** of so large a K when species are shuffled over the tips, upper tail */
	readonly p: number;
	readonly exact: boolean;
	readonly count: number;
	readonly asExtreme: number;
	readonly monteCarloStandardError: number;
	/** of so large a K when the trait takes a random walk on this tree, upper tail */
	readonly pAboveRandomWalk: number;
	readonly walks: number;
};

export type KOptions = { readonly permutations: number; readonly seed: number; readonly walks: number };

/** What K divides by on a tree, whatever the trait: computed once for all shuffles. */
export type KScale = { readonly tree: TraitTree; readonly expected: number };

/**
 * K's yardstick: the ratio MSE0 / MSE that a random walk gives on this tree, (tr C − n / 1'C⁻¹1) / (n − 1).
 */
export function kScale(aged: AgedTree): KScale {
	const tree = brownianTree(aged);
	const n = tree.tips.length;
	const { rootVariance } = pruneTraits(tree, new Float64Array(n));
	const trace = tree.tips.reduce((sum, tip) => sum + tree.height - (aged.ages[tip] ?? 0), 0);
	return { tree, expected: (trace - n * rootVariance) / (n - 1) };
}

/**
 * Blomberg's K: how alike relatives are beside a random walk on the same tree.
 *
 * @param x - shape (tips,), in tree order; not all equal
 * @see Blomberg, Garland & Ives (2003), doi:10.1111/j.0014-3820.2003.tb00285.x
 */
export function blombergK({ tree, expected }: KScale, x: ArrayLike<number>): number {
	const { rootMean, quadratic } = pruneTraits(tree, x);
	let around = 0;
	for (let i = 0; i < tree.tips.length; i++) around += ((x[i] ?? 0) - rootMean) ** 2;
	return around / quadratic / expected;
}

/** K with its two questions: more than species at random, and more than a random walk. Exact where the orders are few. */
export function testK(aged: AgedTree, x: Float64Array, { permutations, seed, walks }: KOptions): KTest {
	const scale = kScale(aged);
	const k = blombergK(scale, x);
	const n = x.length;
	const question = { tipCount: n, groups: [{ from: 0, to: n }], domain: STREAM_DOMAIN.free, seed, permutations };
	const { exact, count } = plannedArrangements(question);
	const counts = { less: 0, greater: 0 };
	const moved = new Float64Array(n);
	for (const batch of shuffleBatches(question)) {
		for (let row = 0; row < batch.count; row++) {
			for (let i = 0; i < n; i++) moved[i] = x[batch.arrangements[row * n + i] ?? 0] ?? 0;
			const shuffled = blombergK(scale, moved);
			if (shuffled <= k * (1 + TIE)) counts.less++;
			if (shuffled >= k * (1 - TIE)) counts.greater++;
		}
	}
	const { pGreater } = permutationPValue(counts, count, exact);
	return {
		k,
		p: pGreater,
		exact,
		count,
		asExtreme: counts.greater,
		monteCarloStandardError: exact ? 0 : monteCarloError(pGreater, count),
		pAboveRandomWalk: aboveRandomWalk(scale, k, { seed, walks }),
		walks
	};
}

/** (b + 1) / (walks + 1): the share of simulated random walks whose K is at least as large. */
function aboveRandomWalk(scale: KScale, k: number, { seed, walks }: { seed: number; walks: number }): number {
	const stream = randomStream(seed, 0, STREAM_DOMAIN.signal);
	const { parent, edges, tips } = scale.tree;
	const at = new Float64Array(parent.length);
	const x = new Float64Array(tips.length);
	let asLarge = 0;
	for (let walk = 0; walk < walks; walk++) {
		for (let node = 1; node < parent.length; node++) {
			at[node] = (at[parent[node] ?? 0] ?? 0) + Math.sqrt(edges[node] ?? 0) * nextNormal(stream);
		}
		for (let i = 0; i < tips.length; i++) x[i] = at[tips[i] ?? 0] ?? 0;
		if (blombergK(scale, x) >= k) asLarge++;
	}
	return (asLarge + 1) / (walks + 1);
}
