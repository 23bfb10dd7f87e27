import { nodeSumsByLoop } from './nodeSumsByLoop.ts';
import type { PairBlocks } from './pairBlocks.ts';
import type { ShuffleBatch } from './shuffleBatches.ts';

export type NodeSumsInput = {
	readonly layout: PairBlocks;
	/** shape (n, n), row-major, symmetric; the diagonal is not read */
	readonly overlap: Float64Array;
	readonly tipCount: number;
};

/** Slots are the internal nodes in preorder, as in `PairBlocks`. */
export type NodeSums = {
	/** sums of the overlaps of the pairs that meet at each node */
	readonly plain: Float64Array;
	/** nested averages of the same pairs */
	readonly nested: Float64Array;
};

/**
 * Sums by node of some arrangements of the matrix. Cost: each of the n(n-1)/2 pairs once per arrangement.
 *
 * @param batch - as `shuffleBatches` hands it out
 * @returns shape (count, slots) each, row-major; fresh arrays
 */
export function nodeSumsOfBatch(
	input: NodeSumsInput,
	{ count, arrangements }: Pick<ShuffleBatch, 'count' | 'arrangements'>
): NodeSums {
	const slots = input.layout.pairs.length;
	const plain = new Float64Array(count * slots);
	const nested = new Float64Array(count * slots);
	for (let row = 0; row < count; row++) {
		const sums = nodeSumsByLoop(input, arrangements.subarray(row * input.tipCount, (row + 1) * input.tipCount));
		plain.set(sums.plain, row * slots);
		nested.set(sums.nested, row * slots);
	}
	return { plain, nested };
}
