/** Bits of a double's whole numbers, less one for the rounding of the last sum. */
const EXACT_BITS = 52;

/** A matrix for counting, and how far a cell may be from the one it stands for. */
export type CountingGrid = {
	readonly values: Float64Array;
	/** largest distance of a value from the one it stands for; unit of the values */
	readonly slack: number;
	/** largest magnitude of a value */
	readonly largest: number;
};

/**
 * Values moved to the nearest multiple of a power of two, as fine as it can be with the sum over any pairs still exact:
 * 2^-(52 - ⌈log2 pairs⌉) of the largest value's power of two. For 2,000 species and overlaps up to 1 that is 2^-31.
 * Sums are then the same in every order.
 *
 * @param values - shape (n, n), row-major; the diagonal is read for its size only
 */
export function countingGrid(values: Float64Array, tipCount: number): CountingGrid {
	const pairs = (tipCount * (tipCount - 1)) / 2;
	let largest = 0;
	for (const value of values) largest = Math.max(largest, Math.abs(value));
	const step = 2 ** (ceilLog2(largest) + ceilLog2(pairs) - EXACT_BITS);
	return { values: values.map((value) => Math.round(value / step) * step), slack: step / 2, largest: largest + step };
}

function ceilLog2(value: number): number {
	const guess = Math.ceil(Math.log2(value));
	return 2 ** guess < value ? guess + 1 : guess;
}
