/** Sum of the values with the rounding of every addition carried along. @see Neumaier (1974), doi:10.1002/zamm.19740540106 */
export function compensatedSum(values: ArrayLike<number>): number {
	let sum = 0;
	let lost = 0;
	for (let i = 0; i < values.length; i++) {
		const value = values[i] ?? 0;
		const next = sum + value;
		lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
		sum = next;
	}
	return sum + lost;
}

/**
 * Dot product as if computed in twice the working precision and rounded once. Products are split by Veltkamp's
 * method because JavaScript has no fused multiply-add. Values beyond about 1e300 overflow in the splitting.
 *
 * @see Ogita, Rump & Oishi (2005), doi:10.1137/030601818, algorithm 5.3 (Dot2)
 */
export function compensatedDot(a: ArrayLike<number>, b: ArrayLike<number>): number {
	let sum = 0;
	let lost = 0;
	for (let i = 0; i < a.length; i++) {
		const x = a[i] ?? 0;
		const y = b[i] ?? 0;
		const product = x * y;
		const next = sum + product;
		const shift = next - sum;
		lost += productError(x, y, product) + (sum - (next - shift) + (product - shift));
		sum = next;
	}
	return sum + lost;
}

/** 2²⁷ + 1 cuts a double's 53 bits in two halves whose products are exact. */
const SPLITTER = 134_217_729;

function productError(x: number, y: number, product: number): number {
	const xHigh = upperHalf(x);
	const yHigh = upperHalf(y);
	const xLow = x - xHigh;
	const yLow = y - yHigh;
	return xLow * yLow - (product - xHigh * yHigh - xLow * yHigh - xHigh * yLow);
}

function upperHalf(value: number): number {
	const scaled = SPLITTER * value;
	return scaled - (scaled - value);
}
