import jstat from 'jstat';

/**
 * The Clopper-Pearson interval for the probability behind b successes in m independent trials: exact, never too short.
 *
 * @param b - whole number in [0, m]
 * @param m - whole number, at least 1
 * @param level - confidence in (0, 1), such as 0.95
 * @returns [lower, upper], each in [0, 1]; to about nine digits, which an interval of shuffles does not need (decision 0010)
 * @see Clopper & Pearson (1934), doi:10.1093/biomet/26.4.404
 */
export function clopperPearson(b: number, m: number, level: number): [number, number] {
	if (!(b >= 0 && b <= m && m >= 1 && level > 0 && level < 1)) {
		throw new Error(`An interval needs 0 <= b <= m, m >= 1 and a level in (0, 1); got ${b}, ${m}, ${level}.`);
	}
	const tail = (1 - level) / 2;
	const lower = b === 0 ? 0 : jstat.beta.inv(tail, b, m - b + 1);
	const upper = b === m ? 1 : jstat.beta.inv(1 - tail, b + 1, m - b);
	return [lower, upper];
}
