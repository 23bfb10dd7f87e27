import { kernelRegions } from './kernelRegions.ts';
import { BLOCK_WIDTH, type PairBlocks } from './pairBlocks.ts';
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
 * Sums by node of some arrangements of the matrix, by the compiled kernel, bit for bit those of `nodeSumsByLoop`. Cost:
 * each of the n(n-1)/2 pairs once per arrangement.
 *
 * @param batch - as `shuffleBatches` hands it out
 * @returns shape (count, slots) each, row-major; fresh arrays
 */
export function nodeSumsOfBatch(input: NodeSumsInput, batch: Pick<ShuffleBatch, 'count' | 'arrangements'>): NodeSums {
	const regions = kernelRegions({
		...nodeSumsParts(input, batch.count),
		arrangements: batch.arrangements.subarray(0, batch.count * input.tipCount)
	});
	regions.run('nodeSums', nodeSumsTask(input, batch.count, regions.address));
	const length = batch.count * input.layout.pairs.length;
	return { plain: regions.doubles('plain', length).slice(), nested: regions.doubles('nested', length).slice() };
}

type NodeSumsRegion = keyof ReturnType<typeof nodeSumsParts> | 'arrangements';

/** What node sums of up to `count` arrangements need in the kernel's memory beside the arrangements. */
export function nodeSumsParts({ layout, overlap, tipCount }: NodeSumsInput, count: number) {
	const sumBytes = 8 * count * layout.pairs.length;
	return {
		matrix: overlap,
		blocks: layout.blocks,
		weights: layout.weights,
		weightShift: layout.weightShift,
		childPairWeight: layout.childPairWeight,
		plain: sumBytes,
		nested: sumBytes,
		offsets: 4 * tipCount
	};
}

/** The fields of `NodeSumsTask` in src/kernel. */
export function nodeSumsTask(
	{ layout, tipCount }: NodeSumsInput,
	count: number,
	address: (name: NodeSumsRegion) => number
): number[] {
	return [
		address('matrix'),
		address('arrangements'),
		count,
		tipCount,
		address('blocks'),
		layout.blocks.length / BLOCK_WIDTH,
		address('weights'),
		address('weightShift'),
		address('childPairWeight'),
		layout.pairs.length,
		address('plain'),
		address('nested'),
		address('offsets')
	];
}
