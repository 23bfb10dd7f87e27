import { InputError } from '#lib/remarks/inputError.ts';

/**
 * Overlaps on the logit scale, ln((o + e) / (1 − o + e)) with e half the smallest positive value among all o and 1 − o, so that
 * exact 0 and 1 stay finite. A sensitivity check: the permutation p needs no transform.
 *
 * @param overlap - shape (n, n), row-major, symmetric, off-diagonal in [0, 1]; the diagonal is copied as 0
 * @returns shape (n, n); dimensionless
 * @throws {InputError} `no-logit` when every overlap is 0 or 1, so that no e exists, or a value lies outside [0, 1]
 * @see Warton & Hui (2011), doi:10.1890/10-0340.1
 */
export function logitOverlap(overlap: Float64Array, count: number): Float64Array {
	let smallest = Number.POSITIVE_INFINITY;
	for (let i = 0; i < count; i++) {
		for (let j = 0; j < i; j++) {
			const value = overlap[i * count + j] ?? Number.NaN;
			if (!(value >= 0 && value <= 1))
				throw new InputError('no-logit', `The logit needs overlaps from 0 to 1; one is ${value}. Use no transform.`);
			for (const side of [value, 1 - value]) if (side > 0 && side < 1 && side < smallest) smallest = side;
		}
	}
	if (!Number.isFinite(smallest)) {
		throw new InputError(
			'no-logit',
			'The logit needs at least one overlap strictly between 0 and 1; all are 0 or 1. Use no transform.'
		);
	}
	const e = smallest / 2;
	const logit = new Float64Array(count * count);
	for (let i = 0; i < count; i++) {
		for (let j = 0; j < count; j++) {
			const value = overlap[i * count + j] ?? Number.NaN;
			if (i !== j) logit[i * count + j] = Math.log((value + e) / (1 - value + e));
		}
	}
	return logit;
}
