import { denseSumsByLoop } from './denseSumsByLoop.ts';
import type { ShuffleBatch } from './shuffleBatches.ts';

export type DenseSumsInput = {
	/** shape (n, n), row-major, symmetric: the matrix whose rows and columns move; the diagonal is not read */
	readonly cells: Float64Array;
	/** shape (n, n), row-major: the matrix that stays; only its strict lower triangle is read */
	readonly weights: Float64Array;
	readonly tipCount: number;
};

/**
 * The sum over pairs of moved cell times weight, for some arrangements: Mantel's z of any two symmetric matrices. Cost:
 * each of the n(n-1)/2 pairs once per arrangement.
 *
 * @param batch - as `shuffleBatches` hands it out
 * @returns shape (count,); a fresh array
 */
export function denseSumsOfBatch(
	input: DenseSumsInput,
	{ count, arrangements }: Pick<ShuffleBatch, 'count' | 'arrangements'>
): Float64Array {
	const sums = new Float64Array(count);
	for (let row = 0; row < count; row++) {
		sums[row] = denseSumsByLoop(input, arrangements.subarray(row * input.tipCount, (row + 1) * input.tipCount));
	}
	return sums;
}
