import { LAID_BLOCK_WIDTH, type LaidTree } from './posteriorTree.ts';

/**
 * What the pairs that meet at each node add up to.
 *
 * @param overlap - shape (n, n), row-major, by row of the matrix
 * @returns shape (internal nodes,)
 */
export function nodeSums(overlap: Float64Array, { tree, internalCount, blockCount, blocks }: LaidTree): Float64Array {
	const { rows } = tree;
	const n = rows.length;
	const sums = new Float64Array(internalCount);
	for (let block = 0; block < blockCount * LAID_BLOCK_WIDTH; block += LAID_BLOCK_WIDTH) {
		const slot = blocks[block] ?? 0;
		const rowFrom = blocks[block + 1] ?? 0;
		const rowTo = blocks[block + 2] ?? 0;
		const columnFrom = blocks[block + 3] ?? 0;
		let sum = 0;
		for (let row = rowFrom; row < rowTo; row++) {
			const start = (rows[row] ?? 0) * n;
			for (let column = columnFrom; column < rowFrom; column++) sum += overlap[start + (rows[column] ?? 0)] ?? 0;
		}
		sums[slot] = (sums[slot] ?? 0) + sum;
	}
	return sums;
}
