import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mrcaAges } from './mrcaAges.ts';
import { parseNewick } from './newick.ts';
import { nodeAges } from './nodeAges.ts';
import { pruneTree } from './pruneTree.ts';
import { nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipIndices, tipLabels } from './tree.ts';
import { levelTips } from './ultrametric.ts';
import { writeNewick } from './writeNewick.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}
const prunedTo = (text: string, labels: string) => {
	const tree = only(text);
	return pruneTree(
		tree,
		tipIndices(tree).filter((tip) => labels.includes(tree.label[tip] ?? '?'))
	);
};

describe('pruneTree', () => {
	// By hand.
	it.each([
		['((A:1,B:1)x:1,C:2)y;', 'AC', '(A:2,C:2)y;'],
		['((A:1,B:1)x:1,C:2)y;', 'AB', '(A:1,B:1)x;'],
		['((A:1,B:1,C:1)x:2,D:3);', 'ABD', '((A:1,B:1)x:2,D:3);'],
		['(((A:1):1,B:2):1,C:3);', 'ABC', '((A:2,B:2):1,C:3);'],
		['((A:1,B:1):1,(C:1,D:1):1);', 'DA', '(A:2,D:2);']
	])('of %s to %s is %s', (text, labels, expected) => expect(writeNewick(prunedTo(text, labels))).toBe(expected));

	it('keeps every MRCA age, every label and no single-child node', () => {
		const cases = nestedTrees(fc.double({ min: 0, max: 10, noNaN: true }))
			.map((nested) => levelTips(only(`${nestedText(nested)};`)))
			.chain((tree) => fc.tuple(fc.constant(tree), fc.subarray(tipIndices(tree), { minLength: 2 })));
		fc.assert(
			fc.property(cases, ([tree, tips]) => {
				const pruned = pruneTree(tree, tips);
				const before = mrcaAges(tree, nodeAges(tree), tips);
				const after = mrcaAges(pruned, nodeAges(pruned));
				expect(tipLabels(pruned)).toEqual(tips.map((tip) => tree.label[tip]));
				expect(pruned.childCount.includes(1)).toBe(false);
				for (const [cell, age] of after.entries()) expect(Math.abs(age - (before[cell] ?? NaN))).toBeLessThan(1e-12 * 100);
			})
		);
	});

	it('keeps the annotations of a node and leaves out those of a joined branch', () => {
		const tree = prunedTo('((A[&a=1]:[&rate=2]1,B:1)[&h=3]:1,C:[&rate=4]2);', 'AC');
		expect(tree.annotations).toEqual(
			new Map([
				[1, { a: '1' }],
				[2, { 'branch:rate': '4' }]
			])
		);
	});

	it('copes with a deep caterpillar', () => {
		const inner = Array.from({ length: 9_998 }, (_, i) => `:1,t${i}:1)`).join('');
		const tree = only(`${'('.repeat(9_999)}x:1,y:1)${inner};`);
		const tips = tipIndices(tree);
		// x lies 9,999 branches below the root, where the last tip joins.
		expect([...pruneTree(tree, [tips[0] ?? 0, tips.at(-1) ?? 0]).length]).toEqual([0, 9_999, 1]);
	});

	it('refuses fewer than two tips and an inner node', () => {
		const tree = only('((A:1,B:1):1,C:2);');
		expect(() => pruneTree(tree, [2])).toThrow('Expected at least 2 tips to keep; got 1. Keep more species.');
		expect(() => pruneTree(tree, [1, 2])).toThrow('Expected the index of a tip to keep; got 1.');
	});
});
