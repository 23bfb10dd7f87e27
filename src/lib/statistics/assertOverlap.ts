import { InputError } from '#lib/remarks/inputError.ts';

/**
 * Holds a matrix to shape (n, n), row-major, symmetric and finite off the diagonal, which nothing here reads.
 *
 * @throws {InputError} `non-finite` names the two rows, counted from 1; `asymmetric` likewise
 */
export function assertOverlap(values: Float64Array, count: number): void {
	if (values.length !== count * count) {
		throw new Error(`A matrix of ${count} species has ${count * count} cells; got ${values.length}.`);
	}
	for (let i = 1; i < count; i++) {
		for (let j = 0; j < i; j++) {
			const value = values[i * count + j] ?? Number.NaN;
			const mirrored = values[j * count + i] ?? Number.NaN;
			if (!Number.isFinite(value) || !Number.isFinite(mirrored)) {
				throw new InputError(
					'non-finite',
					`Expected every pair to have a finite number; rows ${i + 1} and ${j + 1} have ${value} and ${mirrored}. Drop the species or fill the pair.`
				);
			}
			if (value !== mirrored) {
				throw new InputError(
					'asymmetric',
					`Expected a symmetric matrix; rows ${i + 1} and ${j + 1} have ${value} and ${mirrored}. Choose one triangle.`
				);
			}
		}
	}
}
