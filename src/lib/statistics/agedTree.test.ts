import { describe, expect, it } from 'vitest';
import { treeShape } from './agedTree.ts';
import { exampleTree } from './exampleTrees.ts';

describe('treeShape', () => {
	// By hand: preorder 0 root, 1 AB, 2 A, 3 B, 4 CDE, 5 C, 6 D, 7 E.
	const shape = treeShape(exampleTree('((A:1,B:1):2,(C:2,D:2,E:2):1);'));

	it('lists tips and internal nodes in tree order', () => {
		expect([...shape.tips]).toEqual([2, 3, 5, 6, 7]);
		expect([...shape.internal]).toEqual([0, 1, 4]);
	});

	it('gives each node the run of its tips', () => {
		expect([...shape.tipFrom]).toEqual([0, 0, 0, 1, 2, 2, 3, 4]);
		expect([...shape.tipTo]).toEqual([5, 2, 1, 2, 5, 3, 4, 5]);
	});

	it('lists the children of a polytomy in order', () => {
		expect(shape.children[4]).toEqual([5, 6, 7]);
		expect(shape.children[2]).toEqual([]);
	});
});
