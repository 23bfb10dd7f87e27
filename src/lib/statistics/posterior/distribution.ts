import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from '../assertAllFinite.ts';
import { compensatedSum } from '../compensatedSum.ts';
import { quantiles } from '../quantiles.ts';

/** How a number varies over the trees of a set: a description of sensitivity to the dating, not a probability. */
export type Distribution = {
	readonly mean: number;
	/** [probability, value] at 2.5, 25, 50, 75 and 97.5 % */
	readonly quantiles: [number, number][];
	/** the shortest interval that holds 95 % of the values */
	readonly highestDensity: [number, number];
};

const PROBABILITIES = [0.025, 0.25, 0.5, 0.75, 0.975] as const;
const LEVEL = 0.95;

/** @throws {InputError} `empty` without values; `non-finite` */
export function distribution(values: Float64Array): Distribution {
	return {
		mean: compensatedSum(values) / values.length,
		quantiles: quantiles(values, PROBABILITIES),
		highestDensity: shortestInterval(values, LEVEL)
	};
}

/**
 * The shortest interval between two of the values that holds at least a share of them; of several, the lowest.
 *
 * @param level - share in (0, 1]
 * @throws {InputError} `empty` without values; `non-finite`
 * @see Chen & Shao (1999), doi:10.1080/10618600.1999.10474802
 */
export function shortestInterval(values: Float64Array, level: number): [number, number] {
	if (values.length === 0) throw new InputError('empty', 'Expected at least 1 value for an interval; got 0.');
	if (!(level > 0 && level <= 1)) throw new Error(`A share lies in (0, 1]; got ${level}.`);
	assertAllFinite(values, 'value');
	const sorted = Float64Array.from(values).sort();
	const held = Math.ceil(level * sorted.length);
	let best: [number, number] = [sorted[0] ?? 0, sorted[held - 1] ?? 0];
	for (let from = 1; from + held <= sorted.length; from++) {
		const next: [number, number] = [sorted[from] ?? 0, sorted[from + held - 1] ?? 0];
		if (next[1] - next[0] < best[1] - best[0]) best = next;
	}
	return best;
}
