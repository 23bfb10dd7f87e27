import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { tipIndices, type Tree } from '#lib/phylogeny/tree.ts';
import { isStar } from '#lib/phylogeny/treeShape.ts';
import { type Remark, remark } from '#lib/remarks/remark.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';

/** A side is small with up to three species, or up to a fifth of them. */
const SMALL_COUNT = 3;
const SMALL_SHARE = 0.2;
/** Share of all pairs that one old split may hold before it is asked about. */
const LARGE_SHARE = 0.4;

type Pruned = {
	readonly tree: Tree;
	/** shape (nodes,) */
	readonly ages: Float64Array;
	/** in tree order */
	readonly species: readonly string[];
	/** species that a test needs */
	readonly fewest: number;
};

/** A small side of the root that takes part in many of the pairs. */
export type OutgroupSide = {
	readonly species: readonly string[];
	/** the species that remain without it, in tree order */
	readonly rest: readonly string[];
	/** pairs of one species of the side and one of the rest */
	readonly pairs: number;
	readonly allPairs: number;
};

/**
 * The small side of the root whose pairs with the rest are more than 40 % of all, as an outgroup's are in a small study;
 * null when there is none, or when too few species would remain to be tested.
 */
export function outgroupSide({ tree, ages, species, fewest }: Pruned): OutgroupSide | null {
	const { children, internal, tipFrom, tipTo } = treeShape({ parent: tree.parent, ages });
	const count = species.length;
	const allPairs = (count * (count - 1)) / 2;
	for (const side of children[internal[0] ?? 0] ?? []) {
		const [from, to] = [tipFrom[side] ?? 0, tipTo[side] ?? 0];
		const pairs = (to - from) * (count - to + from);
		const isSmall = to - from <= Math.max(SMALL_COUNT, SMALL_SHARE * count);
		if (!isSmall || pairs <= LARGE_SHARE * allPairs) continue;
		const rest = species.filter((_, position) => position < from || position >= to);
		const kept = tipIndices(tree).filter((_, position) => position < from || position >= to);
		if (rest.length < fewest || isStar(pruneTree(tree, kept))) continue;
		return { species: species.slice(from, to), rest, pairs, allPairs };
	}
	return null;
}

/** The question that is asked before the run. */
export function outgroupRemarks(side: OutgroupSide | null): Remark[] {
	if (side === null) return [];
	const name = [side.species.slice(0, -1).join(', '), ...side.species.slice(-1)].filter((part) => part !== '').join(' and ');
	const message = `${side.pairs} of ${side.allPairs} pairs meet at the root between ${name} and the rest: run also without ${name}?`;
	return [remark('look', 'outgroup-side', message)];
}
