import { incompleteBeta } from './specialFunctions.ts';

/** Halvings of [0, 1] until the two ends are neighbouring doubles, or far below any p-value. */
const HALVINGS = 200;

/**
 * The Clopper-Pearson interval for the probability behind b successes in m independent trials: exact, never too short.
 *
 * @param b - whole number in [0, m]
 * @param m - whole number, at least 1
 * @param level - confidence in (0, 1), such as 0.95
 * @returns [lower, upper], each in [0, 1]
 * @see Clopper & Pearson (1934), doi:10.1093/biomet/26.4.404
 */
export function clopperPearson(b: number, m: number, level: number): [number, number] {
	if (!(b >= 0 && b <= m && m >= 1 && level > 0 && level < 1)) {
		throw new Error(`An interval needs 0 <= b <= m, m >= 1 and a level in (0, 1); got ${b}, ${m}, ${level}.`);
	}
	const tail = (1 - level) / 2;
	const lower = b === 0 ? 0 : betaQuantile(tail, b, m - b + 1);
	const upper = b === m ? 1 : betaQuantile(1 - tail, b + 1, m - b);
	return [lower, upper];
}

/** Bisection: the distribution function is monotone, and a wrong start cannot lead astray. */
function betaQuantile(probability: number, a: number, b: number): number {
	let low = 0;
	let high = 1;
	for (let step = 0; step < HALVINGS; step++) {
		const middle = (low + high) / 2;
		if (middle === low || middle === high) break;
		if (incompleteBeta(middle, a, b) < probability) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
