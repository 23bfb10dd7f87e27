const LN_SQRT_TWO_PI = 0.918_938_533_204_672_8;
/** From here on eight terms of Stirling's series leave less than 1e-16. */
const STIRLING_FROM = 15;
/** B_2k / (2k (2k - 1)) for k = 1..8. @see NIST DLMF 5.11.1 and table 24.2.1 */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360_360, 1 / 156, -3617 / 122_400];
/** Relative size of a term below which a series or continued fraction has settled. */
const SETTLED = 1e-16;
/** A fraction of large parameters needs about the square root of them; beyond this something is wrong. */
const MOST_TERMS = 1_000_000;

/** Natural logarithm of the gamma function for x > 0: Stirling's series above 15, reached by recurrence. @see DLMF 5.11.1 */
export function lnGamma(x: number): number {
	let factor = 1;
	let shifted = x;
	for (; shifted < STIRLING_FROM; shifted++) factor *= shifted;
	let series = 0;
	for (const [k, term] of STIRLING.entries()) series += term / shifted ** (2 * k + 1);
	return (shifted - 0.5) * Math.log(shifted) - shifted + LN_SQRT_TWO_PI + series - Math.log(factor);
}

/**
 * Regularised incomplete gamma functions: lower P(shape, x) and upper Q(shape, x), which add up to 1; each is computed
 * directly where it is the smaller, so neither tail loses its digits.
 *
 * @param shape - > 0
 * @param x - >= 0
 * @see NIST DLMF 8.7.1 (series) and 8.9.2 (continued fraction)
 */
export function incompleteGamma(shape: number, x: number): { lower: number; upper: number } {
	if (x <= 0) return { lower: 0, upper: 1 };
	const scale = Math.exp(shape * Math.log(x) - x - lnGamma(shape));
	if (x < shape + 1) {
		const lower = Math.min(1, scale * gammaSeries(shape, x));
		return { lower, upper: 1 - lower };
	}
	const upper = Math.min(1, scale / settle((k) => (k === 0 ? [1, x + 1 - shape] : [-k * (k - shape), x + 2 * k + 1 - shape])));
	return { lower: 1 - upper, upper };
}

function gammaSeries(shape: number, x: number): number {
	let term = 1 / shape;
	let sum = term;
	for (let k = 1; k < MOST_TERMS; k++) {
		term *= x / (shape + k);
		sum += term;
		if (term < sum * SETTLED) return sum;
	}
	throw new Error(`The series of the incomplete gamma function did not settle at shape ${shape}, x ${x}.`);
}

/**
 * b0 + a1/(b1 + a2/(b2 + …)) by the modified Lentz method; `term(k)` gives [a_k, b_k], a_0 unused.
 * @see Thompson & Barnett (1986), doi:10.1016/0021-9991(86)90046-X
 */
function settle(term: (k: number) => readonly [number, number]): number {
	const TINY = 1e-300;
	let value = term(0)[1] || TINY;
	let c = value;
	let d = 0;
	for (let k = 1; k < MOST_TERMS; k++) {
		const [numerator, denominator] = term(k);
		d = 1 / (denominator + numerator * d || TINY);
		c = denominator + numerator / c || TINY;
		value *= c * d;
		if (Math.abs(c * d - 1) < 4 * SETTLED) return value;
	}
	throw new Error('A continued fraction did not settle.');
}
