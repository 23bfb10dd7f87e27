import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import { nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipIndices } from './tree.ts';
import { writeNewick } from './writeNewick.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}

describe('writeNewick', () => {
	it.each(['((A:1,B:1)95:1,C:2)root;', "('Homo sapiens':1,Pan_x:1e-7);", '((A,B),C);', '(((A:1,B:1):1):1,C:3);'])(
		'writes %s as it was',
		(text) => expect(writeNewick(only(text))).toBe(text)
	);

	it('reads back as the same tree, whatever the labels and lengths', () => {
		const label = fc.string({ unit: 'grapheme', minLength: 1 }).filter((text) => !/[\r\n]/.test(text));
		const trees = nestedTrees(fc.double({ min: 0, noNaN: true, noDefaultInfinity: true })).map((nested) =>
			only(`${nestedText(nested)};`)
		);
		const named = trees.chain((tree) => {
			const count = tipIndices(tree).length;
			const labels = fc.uniqueArray(label, { minLength: count, maxLength: count });
			return fc.tuple(fc.constant(tree), labels);
		});
		fc.assert(
			fc.property(named, ([tree, labels]) => {
				const names = [...labels];
				const renamed = { ...tree, label: tree.label.map((_, node) => (tree.childCount[node] === 0 ? (names.pop() ?? '') : '')) };
				const { labelRaw: _raw, ...back } = only(writeNewick(renamed));
				const { labelRaw: _old, ...expected } = renamed;
				expect(back).toEqual(expected);
			})
		);
	});

	it('copes with a deep caterpillar', () => {
		const inner = Array.from({ length: 9_998 }, (_, i) => `:1,t${i}:1)`).join('');
		const text = `${'('.repeat(9_999)}x:1,y:1)${inner};`;
		expect(writeNewick(only(text))).toBe(text);
	});
});
