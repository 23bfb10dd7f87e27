import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from './agedTree.ts';
import { identityArrangement, shuffleInPlace } from './arrangements.ts';
import { drawnOverlap, drawnTree, exampleTree } from './exampleTrees.ts';
import { nodeSumsByLoop } from './nodeSumsByLoop.ts';
import { pairBlocks } from './pairBlocks.ts';
import { randomStream } from './randomStream.ts';

function sumsOf(tree: AgedTree, overlap: Float64Array, arrangement?: Int32Array) {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	const layout = pairBlocks(shape);
	const sums = nodeSumsByLoop({ layout, overlap, tipCount }, arrangement ?? identityArrangement(tipCount));
	return { sums, layout, shape };
}

/** The definition, opened clade by clade: the mean over the children of one, then of the other; the slow way. */
function nestedAverage(tree: AgedTree, value: (a: number, b: number) => number): number[] {
	const { children, internal, tipFrom } = treeShape(tree);
	const across = (a: number, b: number): number => {
		const [opened, other] = (children[a] ?? []).length > 0 ? [a, b] : [b, a];
		const below = children[opened] ?? [];
		if (below.length === 0) return value(tipFrom[a] ?? 0, tipFrom[b] ?? 0);
		return below.reduce((sum, child) => sum + across(child, other), 0) / below.length;
	};
	return Array.from(internal, (node) => {
		const below = children[node] ?? [];
		const pairs = below.flatMap((a, k) => below.slice(0, k).map((b) => across(a, b)));
		return pairs.reduce((sum, mean) => sum + mean, 0) / pairs.length;
	});
}

describe('nodeSumsByLoop', () => {
	it('visits every pair once, at the node where it meets', () => {
		const stream = randomStream(5, 0, 8);
		const tree = drawnTree(23, stream, { polytomies: true });
		const { layout } = sumsOf(tree, drawnOverlap(23, stream));
		expect(layout.pairs.reduce((sum, count) => sum + count, 0)).toBe((23 * 22) / 2);
	});

	it('agrees with averages opened clade by clade, polytomies and arrangements included', () => {
		fc.assert(
			fc.property(fc.integer({ min: 3, max: 16 }), fc.integer({ min: 0, max: 1e6 }), (n, seed) => {
				const stream = randomStream(seed, n, 8);
				const tree = drawnTree(n, stream, { polytomies: true });
				const overlap = drawnOverlap(n, stream, 6);
				const arrangement = identityArrangement(n);
				shuffleInPlace(arrangement, stream, { from: 0, to: n });
				const { sums } = sumsOf(tree, overlap, arrangement);
				const expected = nestedAverage(tree, (a, b) => overlap[(arrangement[a] ?? 0) * n + (arrangement[b] ?? 0)] ?? 0);
				for (const [slot, mean] of expected.entries()) expect(sums.nested[slot]).toBeCloseTo(mean, 12);
			})
		);
	});

	// By hand: the root of a ladder of 1,200 species averages 1s to 1. Weights from the root would need 4^1200, beyond a double.
	it('survives a ladder of 1,200 species', () => {
		const n = 1200;
		const ladder = { parent: new Int32Array(2 * n - 1), ages: new Float64Array(2 * n - 1) };
		for (let k = 0; k < 2 * n - 1; k++) ladder.parent[k] = k === 0 ? -1 : k % 2 === 1 ? k - 1 : k - 2;
		const { sums } = sumsOf(ladder, new Float64Array(n * n).fill(1));
		expect([...sums.nested].every((mean) => Math.abs(mean - 1) < 1e-12)).toBe(true);
		expect(sums.plain[0]).toBe(n - 1);
	});
});

describe('pairBlocks', () => {
	// By hand: (((A,B),C),D): at the root A and B weigh 1/4, C 1/2, D 1.
	it('weighs tips from the child of the node downwards', () => {
		const layout = pairBlocks(treeShape(exampleTree('(((A:1,B:1):1,C:2):2,D:4);')));
		expect([...layout.weights.slice(0, 4)]).toEqual([1 / 4, 1 / 4, 1 / 2, 1]);
	});

	// By hand: three children make 3 pairs of children, each 1/3.
	it('shares a polytomy among the pairs of its children', () => {
		const layout = pairBlocks(treeShape(exampleTree('(A:1,B:1,C:1);')));
		expect([...layout.childPairWeight]).toEqual([1 / 3]);
		expect([...layout.pairs]).toEqual([3]);
	});
});
