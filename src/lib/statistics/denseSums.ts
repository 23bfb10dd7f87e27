import { kernelRegions } from './kernelRegions.ts';
import type { ShuffleBatch } from './shuffleBatches.ts';

export type DenseSumsInput = {
	/** shape (n, n), row-major, symmetric: the matrix whose rows and columns move; the diagonal is not read */
	readonly cells: Float64Array;
	/** shape (n, n), row-major: the matrix that stays; only its strict lower triangle is read */
	readonly weights: Float64Array;
	readonly tipCount: number;
};

/**
 * The sum over pairs of moved cell times weight, for some arrangements: Mantel's z of any two symmetric matrices. By the
 * compiled kernel, bit for bit as `denseSumsByLoop`. Cost: each of the n(n-1)/2 pairs once per arrangement.
 *
 * @param batch - as `shuffleBatches` hands it out
 * @returns shape (count,); a fresh array
 */
export function denseSumsOfBatch(
	{ cells, weights, tipCount }: DenseSumsInput,
	{ count, arrangements }: Pick<ShuffleBatch, 'count' | 'arrangements'>
): Float64Array {
	const regions = kernelRegions({
		cells,
		weights,
		arrangements: arrangements.subarray(0, count * tipCount),
		sums: 8 * count,
		offsets: 4 * tipCount
	});
	const { address } = regions;
	// The fields of DenseSumsTask in src/kernel.
	regions.run('denseSums', [
		address('cells'),
		address('weights'),
		address('arrangements'),
		count,
		tipCount,
		address('sums'),
		address('offsets')
	]);
	return regions.doubles('sums', count).slice();
}
