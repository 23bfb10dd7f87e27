/** What a preview found for the plan as it stands. */
export type KnownSmallest = { readonly smallestP: number; readonly exact: boolean; readonly permutations: number };

/**
 * The smallest p that another number of shuffles could give on the same tree, from what is known at this one.
 *
 * No Monte Carlo p is below 1 / (m + 1), doubled when both tails count; the symmetry of the tree may keep it higher.
 * An exact test uses every relabelling, so the number of shuffles has no say.
 *
 * @param shuffles - m, the number asked about
 * @param sides - 1 for one direction, 2 for either
 * @returns probability in (0, 1]; where the tree's own limit is still below what is known, what the shuffles allow
 */
export function smallestPWith(known: KnownSmallest, shuffles: number, sides: 1 | 2): number {
	if (known.exact) return known.smallestP;
	const byShuffles = sides / (shuffles + 1);
	const isTreeLimited = known.smallestP > (sides / (known.permutations + 1)) * (1 + 1e-9);
	return Math.min(1, isTreeLimited ? Math.max(byShuffles, known.smallestP) : byShuffles);
}
