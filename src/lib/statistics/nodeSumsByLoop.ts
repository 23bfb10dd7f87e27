import type { NodeSums, NodeSumsInput } from './nodeSums.ts';
import { BLOCK_WIDTH } from './pairBlocks.ts';

/**
 * Node sums of one arrangement by a plain loop: the reference of the compiled kernel, which must give the same bits.
 * Blocks are added in order and rows upwards. The rows of a block are taken four at a time, each with one running sum
 * over its columns; each row left over keeps four running sums, the columns dealt to them in turn.
 *
 * @param arrangement - shape (n,); the row of the matrix that stands at each tip position
 * @returns shape (slots,) each
 */
export function nodeSumsByLoop({ layout, overlap, tipCount }: NodeSumsInput, arrangement: Int32Array): NodeSums {
	const { blocks, weights, weightShift, childPairWeight, pairs } = layout;
	const plain = new Float64Array(pairs.length);
	const nested = new Float64Array(pairs.length);
	for (let block = 0; block < blocks.length; block += BLOCK_WIDTH) {
		const slot = blocks[block] ?? 0;
		const rowFrom = blocks[block + 1] ?? 0;
		const rowTo = blocks[block + 2] ?? 0;
		const columnFrom = blocks[block + 3] ?? 0;
		const columnTo = blocks[block + 4] ?? 0;
		const shift = weightShift[slot] ?? 0;
		const inFours = rowTo - ((rowTo - rowFrom) % 4);
		let plainSum = 0;
		let nestedSum = 0;
		for (let row = rowFrom; row < rowTo; row++) {
			const cells = (arrangement[row] ?? 0) * tipCount;
			const sums = new Float64Array(4);
			const weighted = new Float64Array(4);
			for (let column = columnFrom; column < columnTo; column++) {
				const lane = row < inFours ? 0 : (column - columnFrom) % 4;
				const value = overlap[cells + (arrangement[column] ?? 0)] ?? 0;
				sums[lane] = (sums[lane] ?? 0) + value;
				weighted[lane] = (weighted[lane] ?? 0) + value * (weights[shift + column] ?? 0);
			}
			plainSum += sumOfLanes(sums);
			nestedSum += sumOfLanes(weighted) * (weights[shift + row] ?? 0);
		}
		plain[slot] = (plain[slot] ?? 0) + plainSum;
		nested[slot] = (nested[slot] ?? 0) + nestedSum * (childPairWeight[slot] ?? 0);
	}
	return { plain, nested };
}

function sumOfLanes(lanes: Float64Array): number {
	return (lanes[0] ?? 0) + (lanes[1] ?? 0) + ((lanes[2] ?? 0) + (lanes[3] ?? 0));
}
