import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from './assertAllFinite.ts';

export type Histogram = {
	/** shape (bins + 1,); ascending */
	readonly edges: number[];
	/** shape (bins,) */
	readonly counts: number[];
};

/**
 * Counts in bins of equal width from the smallest to the largest value. A bin holds its lower edge; the last bin holds
 * both. Equal values fall into one middle bin of a unit-wide range, for a range must not be empty.
 *
 * @param bins - whole number, at least 1
 * @throws {InputError} `empty` without values; `non-finite` on NaN or infinity
 */
export function histogram(values: Float64Array, bins: number): Histogram {
	if (values.length === 0) throw new InputError('empty', 'Expected at least 1 value for a histogram; got 0.');
	if (!Number.isInteger(bins) || bins < 1) throw new Error(`A histogram has at least 1 bin; got ${bins}.`);
	assertAllFinite(values, 'value');
	let lowest = Number.POSITIVE_INFINITY;
	let highest = Number.NEGATIVE_INFINITY;
	for (const value of values) {
		lowest = Math.min(lowest, value);
		highest = Math.max(highest, value);
	}
	const [from, to] = lowest === highest ? [lowest - 0.5, highest + 0.5] : [lowest, highest];
	const edges = Array.from({ length: bins + 1 }, (_, k) => (k === bins ? to : from + ((to - from) * k) / bins));
	const counts = new Array<number>(bins).fill(0);
	for (const value of values) {
		const bin = Math.min(bins - 1, Math.floor(((value - from) / (to - from)) * bins));
		counts[bin] = (counts[bin] ?? 0) + 1;
	}
	return { edges, counts };
}
