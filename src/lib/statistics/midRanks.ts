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
	const sorted = Float64Array.from(values).sort();
	// Looking values up is several times faster than sorting the two million indices of 2,000 species.
	const places = Int32Array.from(values, (value) => firstNotBelow(sorted, value));
	const copies = new Float64Array(sorted.length);
	for (const [i, place] of places.entries()) copies[place] = (copies[place] ?? 0) + (counts[i] ?? 0);

	const gap = RANK_TIE * Math.max(Math.abs(sorted[0] ?? 0), Math.abs(sorted.at(-1) ?? 0));
	const ranks = new Float64Array(sorted.length);
	let before = 0;
	for (let from = 0, to = 0; from < sorted.length; from = to) {
		let tied = copies[to++] ?? 0;
		while (to < sorted.length && (sorted[to] ?? 0) - (sorted[to - 1] ?? 0) <= gap) tied += copies[to++] ?? 0;
		ranks.fill(before + (tied + 1) / 2, from, to);
		before += tied;
	}
	return Float64Array.from(places, (place) => ranks[place] ?? 0);
}

function firstNotBelow(sorted: Float64Array, value: number): number {
	let low = 0;
	let high = sorted.length;
	while (low < high) {
		const middle = (low + high) >>> 1;
		if ((sorted[middle] ?? 0) < value) low = middle + 1;
		else high = middle;
	}
	return low;
}
