import { BLOCK_WIDTH, type PairBlocks } from './pairBlocks.ts';

/** What the kernel reads: the blocks of a tree, and the cells of a matrix with the ranks of its pairs beside them. */
export type BlockInput = {
	readonly layout: PairBlocks;
	/** shape (n, n, 2), row-major: the overlap of each pair and its rank, side by side so that one visit reads both */
	readonly cells: Float64Array;
	readonly tipCount: number;
};

/** Shape (slots,) each: what the pairs that meet at each node add up to. The kernel overwrites them. */
export type BlockSums = {
	/** sums of overlaps */
	readonly plain: Float64Array;
	/** sums of ranks */
	readonly ranks: Float64Array;
	/** nested averages of overlaps */
	readonly nested: Float64Array;
};

export function emptyBlockSums(slots: number): BlockSums {
	return { plain: new Float64Array(slots), ranks: new Float64Array(slots), nested: new Float64Array(slots) };
}

/** Overlaps and their ranks side by side, as the kernel wants them. */
export function interleave(overlap: Float64Array, ranks: Float64Array): Float64Array {
	const cells = new Float64Array(2 * overlap.length);
	for (let cell = 0; cell < overlap.length; cell++) {
		cells[2 * cell] = overlap[cell] ?? 0;
		cells[2 * cell + 1] = ranks[cell] ?? 0;
	}
	return cells;
}

/**
 * Sums of one arrangement by node, every pair visited once for all statistics. The order of the additions is fixed:
 * blocks in order, rows upwards, columns upwards, one sum each; so equal input gives equal bits on any machine.
 *
 * Overlaps are summed as they are, not rounded to a grid that would make sums exact in any order: a grid coarser than
 * the tie tolerance splits ties that the data have (0.4 + 0.8 against 0.7 + 0.5).
 *
 * @param arrangement - shape (n,); the row of the matrix that stands at each tip position
 * @param sums - overwritten
 */
export function sumBlocksInPlace(sums: BlockSums, { layout, cells, tipCount }: BlockInput, arrangement: Int32Array): void {
	const { blocks, weights, weightShift, childPairWeight } = layout;
	sums.plain.fill(0);
	sums.ranks.fill(0);
	sums.nested.fill(0);
	for (let block = 0; block < blocks.length; block += BLOCK_WIDTH) {
		const slot = blocks[block] ?? 0;
		const rowTo = blocks[block + 2] ?? 0;
		const columnFrom = blocks[block + 3] ?? 0;
		const columnTo = blocks[block + 4] ?? 0;
		const shift = weightShift[slot] ?? 0;
		let plain = 0;
		let rankSum = 0;
		let nested = 0;
		for (let row = blocks[block + 1] ?? 0; row < rowTo; row++) {
			const rowStart = (arrangement[row] ?? 0) * tipCount;
			let weighted = 0;
			for (let column = columnFrom; column < columnTo; column++) {
				const cell = (rowStart + (arrangement[column] ?? 0)) << 1;
				const overlap = cells[cell] ?? 0;
				plain += overlap;
				rankSum += cells[cell + 1] ?? 0;
				weighted += overlap * (weights[shift + column] ?? 0);
			}
			nested += weighted * (weights[shift + row] ?? 0);
		}
		sums.plain[slot] = (sums.plain[slot] ?? 0) + plain;
		sums.ranks[slot] = (sums.ranks[slot] ?? 0) + rankSum;
		sums.nested[slot] = (sums.nested[slot] ?? 0) + nested * (childPairWeight[slot] ?? 0);
	}
}
