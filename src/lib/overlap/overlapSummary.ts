import { max, mean, median, min } from 'simple-statistics';
import { InputError } from '#lib/remarks/inputError.ts';
import { pairValue, type PairMatrix } from './pairMatrix.ts';

export type OverlapSummary = {
	/** species in the matrix */
	readonly species: number;
	/** pairs that have a value */
	readonly pairs: number;
	readonly missing: number;
	readonly min: number;
	readonly max: number;
	readonly mean: number;
	readonly median: number;
};

/**
 * Counts and location of the overlaps of a matrix, each pair once, missing pairs left aside.
 * @throws {InputError} `empty` when no pair has a value
 */
export function overlapSummary(matrix: PairMatrix): OverlapSummary {
	const n = matrix.species.length;
	const overlaps: number[] = [];
	for (let i = 0; i < n; i++) {
		for (let j = i + 1; j < n; j++) {
			const value = pairValue(matrix, i, j);
			if (!Number.isNaN(value)) overlaps.push(value);
		}
	}
	if (overlaps.length === 0) throw new InputError('empty', 'Expected at least one pair with an overlap; every pair is missing.');
	return {
		species: n,
		pairs: overlaps.length,
		missing: (n * (n - 1)) / 2 - overlaps.length,
		min: min(overlaps),
		max: max(overlaps),
		mean: mean(overlaps),
		median: median(overlaps)
	};
}
