import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from './assertAllFinite.ts';

/**
 * Sample quantiles by linear interpolation between order statistics, at (n - 1) p + 1: Hyndman and Fan's type 7.
 *
 * @param values - shape (values,); left as they are
 * @param probabilities - each in [0, 1]
 * @returns [probability, value] in the order asked
 * @throws {InputError} `empty` without values; `non-finite` on NaN or infinity
 * @see Hyndman & Fan (1996), doi:10.1080/00031305.1996.10473566
 */
export function quantiles(values: Float64Array, probabilities: readonly number[]): [number, number][] {
	if (values.length === 0) throw new InputError('empty', 'Expected at least 1 value for a quantile; got 0.');
	assertAllFinite(values, 'value');
	const sorted = Float64Array.from(values).sort();
	return probabilities.map((probability) => {
		if (!(probability >= 0 && probability <= 1)) throw new Error(`A probability lies in [0, 1]; got ${probability}.`);
		const place = (sorted.length - 1) * probability;
		const below = sorted[Math.floor(place)] ?? 0;
		const above = sorted[Math.ceil(place)] ?? 0;
		return [probability, below + (place - Math.floor(place)) * (above - below)];
	});
}
