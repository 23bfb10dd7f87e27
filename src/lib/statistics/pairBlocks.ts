import type { TreeShape } from './agedTree.ts';

/** Numbers per block: slot of the node, then the half-open ranges of its rows and columns. */
export const BLOCK_WIDTH = 5;

/**
 * Every pair of tip positions once, as rectangles of pairs that meet at one node. A node with q children has q - 1
 * rectangles: each later child against all earlier ones. A node's slot is its place among the internal nodes.
 */
export type PairBlocks = {
	/** shape (blocks, 5): slot, rowFrom, rowTo, columnFrom, columnTo; columns are the longer side */
	readonly blocks: Int32Array;
	/** shape (slots,); pairs that meet at the node */
	readonly pairs: Float64Array;
	/** nested weights of the tips below each node, node after node */
	readonly weights: Float64Array;
	/** shape (slots,); `weights[weightShift[slot] + position]` is the weight of the tip at `position` */
	readonly weightShift: Int32Array;
	/** shape (slots,); 2 / (q (q - 1)), the weight of each pair of children */
	readonly childPairWeight: Float64Array;
};

/**
 * Lays a tree out as blocks. Nested weights are taken from the child of each node downwards: a product of 1/(number of
 * children) over the nodes strictly below. Taken from the root they would need factors like 4^depth, which overflow on
 * deep ladders; so they only underflow to 0, which is harmless. Memory grows with the sum of clade sizes, n²/2 at worst.
 *
 * @see Fitzpatrick & Turelli (2006), doi:10.1554/05-453.1, for the nested average of two-way trees
 */
export function pairBlocks(shape: TreeShape): PairBlocks {
	const { internal, tipFrom, tipTo, children } = shape;
	const slotOf = new Map(Array.from(internal, (node, slot) => [node, slot]));
	const blocks: number[] = [];
	const pairs = new Float64Array(internal.length);
	const weightShift = new Int32Array(internal.length);
	const childPairWeight = new Float64Array(internal.length);
	let weightCount = 0;
	for (const [slot, node] of internal.entries()) {
		const below = children[node] ?? [];
		const from = tipFrom[node] ?? 0;
		for (const child of below.slice(1)) {
			const middle = tipFrom[child] ?? 0;
			const to = tipTo[child] ?? 0;
			pairs[slot] = (pairs[slot] ?? 0) + (middle - from) * (to - middle);
			// The inner loop runs over columns: the longer side there keeps a ladder's loops long.
			if (to - middle > middle - from) blocks.push(slot, from, middle, middle, to);
			else blocks.push(slot, middle, to, from, middle);
		}
		childPairWeight[slot] = 2 / (below.length * (below.length - 1));
		weightShift[slot] = weightCount - from;
		weightCount += (tipTo[node] ?? 0) - from;
	}

	const weights = new Float64Array(weightCount).fill(1);
	// From the last node back, so that a child's weights stand before its parent reads them.
	for (let slot = internal.length - 1; slot >= 0; slot--) {
		const node = internal[slot] ?? 0;
		for (const child of children[node] ?? []) {
			const childSlot = slotOf.get(child);
			if (childSlot === undefined) continue;
			const share = 1 / (children[child]?.length ?? 1);
			const shift = weightShift[slot] ?? 0;
			const childShift = weightShift[childSlot] ?? 0;
			for (let tip = tipFrom[child] ?? 0; tip < (tipTo[child] ?? 0); tip++) {
				weights[shift + tip] = share * (weights[childShift + tip] ?? 0);
			}
		}
	}
	return { blocks: Int32Array.from(blocks), pairs, weights, weightShift, childPairWeight };
}
