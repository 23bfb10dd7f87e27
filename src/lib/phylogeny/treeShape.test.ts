import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import type { Tree } from './tree.ts';
import { isStar, missingLengths, polytomies, singleChildNodes } from './treeShape.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}

// All by hand.
describe('isStar', () => {
	it.each(['(A:1,B:1,C:1);', '((A:1,B:1):0,C:1);', '(A,B,C);', '((A:1,B:1,C:1):3);', '(A:1,(B:1):0,C:1);'])(
		'holds for %s',
		(text) => expect(isStar(only(text))).toBe(true)
	);

	it.each(['((A:1,B:1):1,C:2);', '((A,B),C);', '((A:1,B:1):0.000001,C:1);'])('does not hold for %s', (text) =>
		expect(isStar(only(text))).toBe(false)
	);
});

describe('polytomies, singleChildNodes and missingLengths', () => {
	it('count nodes and branches', () => {
		const tree = only('((A,B:1,C:1):1,((D:1):1,E:2),F);');
		expect(polytomies(tree)).toBe(2);
		expect(singleChildNodes(tree)).toBe(1);
		expect(missingLengths(tree)).toBe(3);
	});

	it('are 0 for a plain binary tree', () => {
		const tree = only('((A:1,B:1):1,C:2);');
		expect([polytomies(tree), singleChildNodes(tree), missingLengths(tree)]).toEqual([0, 0, 0]);
	});
});
