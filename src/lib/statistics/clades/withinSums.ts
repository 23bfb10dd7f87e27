import type { TreeShape } from '../agedTree.ts';
import { nodeSumsOfBatch } from '../nodeSums.ts';
import { pairBlocks } from '../pairBlocks.ts';
import type { ShuffleBatch } from '../shuffleBatches.ts';
import type { SpeciesGroup } from './cladeList.ts';

/** Sums over the pairs inside each group, for every arrangement of a batch: shape (arrangements, groups), row-major. */
export type WithinSums = (batch: ShuffleBatch) => Float64Array;

/**
 * For clades of one tree: every pair is read once for all of them, and sums rise from each node to the one above. Adding
 * upwards loses no digits, where differences of running totals would lose those of small clades.
 *
 * @param matrix - shape (n, n), row-major, symmetric
 */
export function cladeWithinSums(shape: TreeShape, clades: readonly SpeciesGroup[], matrix: Float64Array): WithinSums {
	const input = { layout: pairBlocks(shape), overlap: matrix, tipCount: shape.tips.length };
	const slotOf = new Map(Array.from(shape.internal, (node, slot) => [node, slot]));
	const above = new Int32Array(shape.internal.length);
	for (const [node, slot] of slotOf) for (const child of shape.children[node] ?? []) above[slotOf.get(child) ?? 0] = slot;
	const slots = Int32Array.from(clades, ({ node }) => slotOf.get(node ?? -1) ?? 0);
	return (batch) => {
		const { plain } = nodeSumsOfBatch(input, batch);
		const within = new Float64Array(batch.count * slots.length);
		for (let drawn = 0; drawn < batch.count; drawn++) {
			const sums = plain.subarray(drawn * above.length, (drawn + 1) * above.length);
			raiseInPlace(sums, above);
			for (let clade = 0; clade < slots.length; clade++) {
				within[drawn * slots.length + clade] = sums[slots[clade] ?? 0] ?? 0;
			}
		}
		return within;
	};
}

/** Adds the sum of each node to that of the node above, from the last in preorder back. */
function raiseInPlace(sums: Float64Array, above: Int32Array): void {
	for (let slot = sums.length - 1; slot > 0; slot--) {
		const to = above[slot] ?? 0;
		sums[to] = (sums[to] ?? 0) + (sums[slot] ?? 0);
	}
}
