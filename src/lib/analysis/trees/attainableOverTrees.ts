import { lnArrangementCount, type Group } from '#lib/statistics/arrangements.ts';
import { lnInterchangeable } from '#lib/statistics/posterior/interchangeable.ts';
import { smallestAttainableP } from '#lib/statistics/permutationPValue.ts';

type Question = {
	/** shape (n, n); weights of the pairs, averaged over trees */
	readonly weights: Float64Array;
	/** shape (n,); species change places within a side only */
	readonly sideOf: Int32Array;
	readonly exact: boolean;
	readonly shuffles: number;
};

/**
 * The smallest one-sided p that any overlaps could give in the test over all trees. Only species that may change places
 * without any pair's mean weight changing always tie; whole clades that mirror each other in every tree do not occur in a
 * sample of dated trees, and are not looked for.
 */
export function smallestPOverTrees({ weights, sideOf, exact, shuffles }: Question): number {
	const sizes = new Map<number, number>();
	for (const side of sideOf) sizes.set(side, (sizes.get(side) ?? 0) + 1);
	const groups = [...sizes.values()].map((size): Group => ({ from: 0, to: size }));
	return smallestAttainableP({
		exact,
		shuffles,
		lnArrangements: lnArrangementCount(groups),
		lnAutomorphisms: lnInterchangeable(weights, sideOf)
	});
}
