import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from './agedTree.ts';
import { identityArrangement } from './arrangements.ts';
import { exampleTree } from './exampleTrees.ts';
import { nodeSumsOfBatch } from './nodeSums.ts';
import { pairBlocks } from './pairBlocks.ts';
import { symmetricMatrix } from './pairValues.ts';

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
});
