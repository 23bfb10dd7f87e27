import { InputError } from '#lib/remarks/inputError.ts';

/** What the pairs whose common ancestor is of some age have shown, and how little that is. */
export type OverlapsOfAge = {
	readonly pairs: number;
	/** nodes where they meet: pairs of one node are one divergence */
	readonly nodes: number;
	/** null without pairs */
	readonly range: { readonly lowest: number; readonly highest: number } | null;
};

export type AgedPairs = {
	/** shape (pairs,); unit of the tree */
	readonly ages: ArrayLike<number>;
	/** shape (pairs,) */
	readonly overlaps: ArrayLike<number>;
	/** shape (pairs,); the node where each pair meets */
	readonly nodes: ArrayLike<number>;
};

/**
 * Lowest and highest overlap among the pairs of an age window, both ends included, with the number of pairs and nodes. A
 * description of these species: no prediction for another pair follows from it.
 *
 * @throws {InputError} `bad-window` when the ends are not ages in order
 */
export function overlapsOfAge({ ages, overlaps, nodes }: AgedPairs, from: number, to: number): OverlapsOfAge {
	if (!(from >= 0 && to >= from && Number.isFinite(to))) {
		throw new InputError('bad-window', `Expected two ages, the younger first; got ${from} and ${to}.`);
	}
	const meeting = new Set<number>();
	let [pairs, lowest, highest] = [0, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
	for (let pair = 0; pair < ages.length; pair++) {
		const age = ages[pair] ?? Number.NaN;
		if (!(age >= from && age <= to)) continue;
		pairs++;
		meeting.add(nodes[pair] ?? -1);
		lowest = Math.min(lowest, overlaps[pair] ?? 0);
		highest = Math.max(highest, overlaps[pair] ?? 0);
	}
	return { pairs, nodes: meeting.size, range: pairs === 0 ? null : { lowest, highest } };
}
