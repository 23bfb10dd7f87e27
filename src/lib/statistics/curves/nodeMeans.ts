import type { AgedTree, TreeShape } from '../agedTree.ts';
import { BLOCK_WIDTH, type PairBlocks } from '../pairBlocks.ts';

/** The internal nodes of a tree, as far as a curve of overlap on age needs them; arrays of shape (slots,), preorder. */
export type NodeAges = {
	readonly ages: Float64Array;
	/** pairs that meet at each node */
	readonly pairs: Float64Array;
};

export function nodeAgesOf(tree: AgedTree, shape: TreeShape, layout: PairBlocks): NodeAges {
	return { ages: Float64Array.from(shape.internal, (node) => tree.ages[node] ?? Number.NaN), pairs: layout.pairs };
}

/**
 * Mean over the pairs that meet at each node. All pairs of a node have one age, so a least-squares curve through the
 * pairs is the curve through these means weighted by their pairs.
 *
 * @param pairValue - of the tip positions of a pair
 * @returns shape (slots,)
 */
export function nodeMeans({ blocks, pairs }: PairBlocks, pairValue: (row: number, column: number) => number): Float64Array {
	const means = new Float64Array(pairs.length);
	for (let block = 0; block < blocks.length; block += BLOCK_WIDTH) {
		const slot = blocks[block] ?? 0;
		const rowTo = blocks[block + 2] ?? 0;
		const columnFrom = blocks[block + 3] ?? 0;
		const columnTo = blocks[block + 4] ?? 0;
		let sum = 0;
		for (let row = blocks[block + 1] ?? 0; row < rowTo; row++) {
			for (let column = columnFrom; column < columnTo; column++) sum += pairValue(row, column);
		}
		means[slot] = (means[slot] ?? 0) + sum / (pairs[slot] ?? 1);
	}
	return means;
}
