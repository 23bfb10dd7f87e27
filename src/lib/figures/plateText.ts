import type { PlateInput } from './plateModel.ts';
import { grouped, significant } from './numberText.ts';

export type AgeUnit = 'Ma' | 'ka' | 'relative';

/** Title of the age axis. */
export function ageTitle(unit: AgeUnit): string {
	return unit === 'relative' ? 'relative age of common ancestor' : `${unit} since common ancestor`;
}

/** “per Myr”: ages are dates in Ma, durations are in Myr. */
export function perAge(unit: AgeUnit): string {
	return unit === 'Ma' ? 'per Myr' : unit === 'ka' ? 'per kyr' : 'per unit of age';
}

/** The sentence that a screen reader speaks in place of the picture. */
export function plateSummary(input: PlateInput, measureName: string, unit: AgeUnit): string {
	const { plate, regression, permutation } = input;
	const count = plate.species.length;
	const direction = regression.slope < 0 ? 'falls' : regression.slope > 0 ? 'rises' : 'does not change';
	const size = regression.slope === 0 ? '' : ` by ${significant(Math.abs(regression.slope), 3)} ${perAge(unit)}`;
	const shuffles = permutation
		? ` Behind it, lines of ${grouped(permutation.count)} ${permutation.exact ? 'relabellings, all there are' : 'shuffles of the species'}.`
		: '';
	return (
		`Plate of ${count} species and ${grouped((count * (count - 1)) / 2)} pairs: ${measureName} of every pair folded against the names, ` +
		`the dated tree, and overlap against the age of the most recent common ancestor. The line through all pairs ${direction}${size}.${shuffles}`
	);
}
