import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from './agedTree.ts';
import { identityArrangement } from './arrangements.ts';
import { emptyBlockSums, interleave, sumBlocksInPlace } from './blockSums.ts';
import { drawnOverlap, drawnTree, exampleTree } from './exampleTrees.ts';
import { nodeSumsOfBatch } from './nodeSums.ts';
import { pairBlocks } from './pairBlocks.ts';
import { symmetricMatrix } from './pairValues.ts';
import { randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { shuffleBatches } from './shuffleBatches.ts';

function inputOf(tree: AgedTree, overlap: Float64Array) {
	return { layout: pairBlocks(treeShape(tree)), overlap, tipCount: Math.round(Math.sqrt(overlap.length)) };
}

describe('nodeSumsOfBatch', () => {
	// By hand: (((A,B),C),D) with D of the worked example: AB 0.8; ABC 0.7 + 0.6, nested 0.65; root 0.4 + 0.4 + 0.5,
	// nested 0.4/4 + 0.4/4 + 0.5/2 = 0.45.
	it('gives the sums and nested averages of the worked example', () => {
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		const input = inputOf(exampleTree('(((A:1,B:1):1,C:2):2,D:4);'), overlap);
		const { plain, nested } = nodeSumsOfBatch(input, { count: 1, arrangements: identityArrangement(4) });
		for (const [slot, value] of [1.3, 1.3, 0.8].entries()) expect(plain[slot]).toBeCloseTo(value, 14);
		for (const [slot, value] of [0.45, 0.65, 0.8].entries()) expect(nested[slot]).toBeCloseTo(value, 14);
	});

	it('agrees with the sums of each arrangement alone, polytomies included', () => {
		const stream = randomStream(8, 0, 8);
		const [tree, overlap] = [drawnTree(23, stream, { polytomies: true }), drawnOverlap(23, stream)];
		const input = inputOf(tree, overlap);
		const slots = input.layout.pairs.length;
		const question = { tipCount: 23, groups: [{ from: 0, to: 23 }], domain: STREAM_DOMAIN.free, seed: 4, permutations: 20 };
		for (const batch of shuffleBatches(question)) {
			const { plain, nested } = nodeSumsOfBatch(input, batch);
			for (let row = 0; row < batch.count; row++) {
				const alone = emptyBlockSums(slots);
				const cells = interleave(overlap, overlap);
				sumBlocksInPlace(alone, { ...input, cells }, batch.arrangements.subarray(row * 23, (row + 1) * 23));
				for (let slot = 0; slot < slots; slot++) {
					expect(plain[row * slots + slot]).toBeCloseTo(alone.plain[slot] ?? 0, 12);
					expect(nested[row * slots + slot]).toBeCloseTo(alone.nested[slot] ?? 0, 12);
				}
			}
		}
	});
});
