import type { TailCounts } from './tally.ts';

export type TailProbabilities = {
	/** of a statistic as low as the observed one, or lower */
	readonly pLess: number;
	readonly pGreater: number;
	/** twice the smaller tail, at most 1; right for skewed nulls too */
	readonly pTwoSided: number;
};

/**
 * p-values of a statistic from the counts of its null. Exact: b / n!, the observed arrangement being one of the n!.
 * Monte Carlo: (b + 1) / (m + 1), the observed arrangement joining the m shuffles; so never 0.
 *
 * @param counts - arrangements at least as extreme, ties included in both tails
 * @param count - n! when exact, else m
 * @throws {Error} when a tail is empty though exact, or counts more than there are
 * @see Phipson & Smyth (2010), doi:10.2202/1544-6115.1585
 */
export function permutationPValue(counts: TailCounts, count: number, exact: boolean): TailProbabilities {
	const added = exact ? 0 : 1;
	const [pLess, pGreater] = [counts.less, counts.greater].map((b) => {
		if (b > count || b + added < 1) throw new Error(`A tail of ${b} among ${count} arrangements cannot be.`);
		return (b + added) / (count + added);
	});
	if (pLess === undefined || pGreater === undefined) throw new Error('A p-value needs the counts of two tails.');
	return { pLess, pGreater, pTwoSided: Math.min(1, 2 * Math.min(pLess, pGreater)) };
}

/** Standard error of a Monte Carlo p-value from m shuffles: sqrt(p (1 - p) / m). */
export function monteCarloError(p: number, m: number): number {
	return Math.sqrt((p * (1 - p)) / m);
}

export type AttainableInput = {
	readonly exact: boolean;
	/** natural logarithm of the number of arrangements: of n!, or of the product of the sides' factorials */
	readonly lnArrangements: number;
	/** natural logarithm of the number of those arrangements that leave every pair's age as it is */
	readonly lnAutomorphisms: number;
	/** m; not read when exact */
	readonly shuffles: number;
};

/**
 * The smallest one-sided p-value that any data on this tree could give: |Aut| / n! since symmetric arrangements always
 * tie; and no Monte Carlo p is below 1 / (m + 1).
 */
export function smallestAttainableP({ exact, lnArrangements, lnAutomorphisms, shuffles }: AttainableInput): number {
	const symmetric = Math.min(1, Math.exp(lnAutomorphisms - lnArrangements));
	return exact ? symmetric : Math.max(symmetric, 1 / (shuffles + 1));
}
