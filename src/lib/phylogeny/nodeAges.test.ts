import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import { nodeAges, nodeDepths, rootAge } from './nodeAges.ts';
import type { Tree } from './tree.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}
const withLength = (tree: Tree, node: number, value: number): Tree => ({ ...tree, length: tree.length.with(node, value) });

// By hand, in the unit of the branch lengths.
describe('nodeAges', () => {
	it('measures from the deepest tip and lets a fossil keep its age', () => {
		expect([...nodeAges(only('((A:1,B:1):1,F:0.5);'))]).toEqual([2, 1, 0, 0, 1.5]);
	});

	it('leaves the branch above the root out', () => expect(nodeAges(only('(A:1,B:1):7;'))[0]).toBe(1));

	it('gives a tip exactly 0 when it is within rounding of the deepest', () => {
		expect(nodeAges(only('(A:1,B:0.9999995);'))[2]).toBe(0);
		expect(nodeAges(only('(A:1,B:0.999998);'))[2]).toBeCloseTo(2e-6, 12);
	});

	it('adds up 9,999 branches of a caterpillar', () => {
		const inner = Array.from({ length: 9_998 }, (_, i) => `:1,t${i}:1)`).join('');
		expect(nodeAges(only(`${'('.repeat(9_999)}x:1,y:1)${inner};`))[0]).toBe(9_999);
	});
});

describe('nodeDepths', () => {
	it('refuses a branch without a length and names it', () => {
		expect(() => nodeDepths(only('((A:1,B):1,C:2);'))).toThrow(
			'Expected every branch to have a length; the branch of "B" has none.'
		);
		expect(() => nodeDepths(only('((A:1,B:1),C:2);'))).toThrow(expect.objectContaining({ code: 'missing-length' }));
	});

	it('refuses a negative and an infinite length', () => {
		const tree = only('(A:1,B:1);');
		expect(() => nodeDepths(withLength(tree, 2, -1))).toThrow('to be a number of at least 0; the branch of "B" has -1.');
		expect(() => nodeDepths(withLength(tree, 2, Infinity))).toThrow(expect.objectContaining({ code: 'non-finite' }));
	});
});

describe('rootAge', () => {
	it('is the age of the first node that branches', () => {
		expect(rootAge(only('((A:1,B:1):1,C:2);'))).toBe(2);
		expect(rootAge(only('(((A:1,B:1):1,C:2):5);'))).toBe(2);
	});
});
