import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import { spanName, spanNames } from './spanName.ts';
import type { Tree } from './tree.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}

// By hand: first and last tip in the order of the text.
describe('spanName', () => {
	it('joins the epithets of first and last tip when all tips share a genus', () => {
		const tree = only('((Ka_rufula:1,Ka_alba:1):1,Ka_tumida:2);');
		expect(spanNames(tree)).toEqual(['rufula–tumida', 'rufula–alba', 'rufula', 'alba', 'tumida']);
	});

	it('uses whole labels when genera differ, and when a genus only begins alike', () => {
		expect(spanName(only('((Ka_rufula:1,Ka_alba:1):1,Lo_tumida:2);'), 1)).toBe('Ka rufula–Ka alba');
		expect(spanName(only('((Ka_rufula:1,Ka_alba:1):1,Kalo_tumida:2);'), 1)).toBe('Ka rufula–Ka alba');
		expect(spanName(only('((A:1,B:1):1,C:2);'), 0)).toBe('A–C');
	});

	it('gives one node the name it has among all', () => {
		const tree = only('((A:1,(B:1,C:1):1):1,((D:1,E:1):1,F:2):1);');
		expect(tree.label.map((_, node) => spanName(tree, node))).toEqual(spanNames(tree));
		expect(spanName(tree, 1)).toBe('A–C');
	});
});
