import type { PlateData } from '#lib/contracts/analysisResult.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import type { AgedPairs } from '#lib/statistics/curves/overlapsOfAge.ts';
import { BLOCK_WIDTH, pairBlocks } from '#lib/statistics/pairBlocks.ts';

/** Every pair of a plate with the age and the node where it meets. */
export function pairsOfPlate({ tree, overlapLower }: Pick<PlateData, 'tree' | 'overlapLower'>): AgedPairs {
	const shape = treeShape({ parent: Int32Array.from(tree.parent), ages: Float64Array.from(tree.age) });
	const { blocks } = pairBlocks(shape);
	const ages = new Float64Array(overlapLower.length);
	const nodes = new Int32Array(overlapLower.length);
	for (let block = 0; block < blocks.length; block += BLOCK_WIDTH) {
		const [slot = 0, rowFrom = 0, rowTo = 0, columnFrom = 0, columnTo = 0] = blocks.subarray(block, block + BLOCK_WIDTH);
		const node = shape.internal[slot] ?? 0;
		for (let row = rowFrom; row < rowTo; row++) {
			for (let column = columnFrom; column < columnTo; column++) {
				const [low, high] = row < column ? [row, column] : [column, row];
				const pair = (high * (high - 1)) / 2 + low;
				ages[pair] = tree.age[node] ?? 0;
				nodes[pair] = node;
			}
		}
	}
	return { ages, overlaps: overlapLower, nodes };
}
