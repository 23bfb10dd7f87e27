import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mrcaAges, mrcaNodes } from './mrcaAges.ts';
import { parseNewick } from './newick.ts';
import { nodeAges } from './nodeAges.ts';
import { nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipIndices } from './tree.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}

/** The slow way: climb from the higher index until both are one node; parents come before children. */
function climbed(tree: Tree, one: number, other: number): number {
	let [a, b] = [one, other];
	while (a !== b) {
		if (a > b) a = tree.parent[a] ?? 0;
		else b = tree.parent[b] ?? 0;
	}
	return a;
}

const anyTree = nestedTrees(fc.integer({ min: 0, max: 9 })).map((nested) => only(`${nestedText(nested)};`));

describe('mrcaAges', () => {
	// By hand.
	it('gives the ages of a small tree, symmetric, with 0 on the diagonal', () => {
		const tree = only('((A:1,B:1):1,C:2);');
		expect([...mrcaAges(tree, nodeAges(tree))]).toEqual([0, 1, 2, 1, 0, 2, 2, 2, 0]);
	});

	it('agrees with climbing from every pair, for any tips in any order', () => {
		const withTips = anyTree.chain((tree) =>
			fc.tuple(fc.constant(tree), fc.shuffledSubarray(tipIndices(tree), { minLength: 1 }))
		);
		fc.assert(
			fc.property(withTips, ([tree, tips]) => {
				const ages = nodeAges(tree);
				const nodes = tips.flatMap((one) => tips.map((other) => climbed(tree, one, other)));
				const diagonalFree = nodes.map((node) => (tree.childCount[node] === 0 ? 0 : (ages[node] ?? NaN)));
				expect([...mrcaNodes(tree, tips)]).toEqual(nodes);
				expect([...mrcaAges(tree, ages, tips)]).toEqual(diagonalFree);
			})
		);
	});

	it('refuses an inner node, a tip named twice and an age that is no number', () => {
		const tree = only('((A:1,B:1):1,C:2);');
		const ages = nodeAges(tree);
		expect(() => mrcaAges(tree, ages, [1, 2])).toThrow(expect.objectContaining({ code: 'not-a-tip' }));
		expect(() => mrcaAges(tree, ages, [2, 3, 2])).toThrow('Expected every tip once; tip "A" stands twice.');
		expect(() => mrcaAges(tree, Float64Array.of(2, NaN, 0, 0, 0))).toThrow(
			'Expected the age of node 1 to be a finite number; got NaN.'
		);
	});
});
