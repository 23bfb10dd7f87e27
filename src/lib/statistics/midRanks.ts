import { ascendingOrder } from './ascendingOrder.ts';
import { assertAllFinite } from './assertAllFinite.ts';

/** Neighbours in order that differ by no more than this share of the largest magnitude are equal but for rounding. */
const RANK_TIE = 1e-12;

/**
 * Ranks from 1, tied values sharing the mean of their ranks. Ties are judged after rounding, so 0.1 + 0.2 ties with 0.3.
 *
 * @returns shape (values,); multiples of one half, so sums of ranks are exact
 * @throws {InputError} `non-finite` on NaN or infinity
 */
export function midRanks(values: ArrayLike<number>): Float64Array {
	return midRanksOfRepeated(values, new Uint8Array(values.length).fill(1));
}

/**
 * The mid-ranks that values have when each stands for several: `counts[i]` pairs share the age `values[i]`.
 *
 * @returns shape (values,); the rank of each value among all the copies
 * @throws {InputError} `non-finite` on NaN or infinity
 */
export function midRanksOfRepeated(values: ArrayLike<number>, counts: ArrayLike<number>): Float64Array {
	assertAllFinite(values, 'value');
	const order = ascendingOrder(values);
	const valueAt = (place: number) => values[order[place] ?? 0] ?? 0;
	const gap = RANK_TIE * Math.max(Math.abs(valueAt(0)), Math.abs(valueAt(order.length - 1)));
	const ranks = new Float64Array(order.length);
	let before = 0;
	for (let from = 0, to = 0; from < order.length; from = to) {
		let tied = 0;
		do tied += counts[order[to++] ?? 0] ?? 0;
		while (to < order.length && valueAt(to) - valueAt(to - 1) <= gap);
		const rank = before + (tied + 1) / 2;
		for (let place = from; place < to; place++) ranks[order[place] ?? 0] = rank;
		before += tied;
	}
	return ranks;
}
