import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import { nestedArrays, nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipLabels } from './tree.ts';

function only(text: string): Tree {
	const { trees } = parseNewick(text);
	if (trees.length !== 1 || trees[0] === undefined) throw new Error('the text holds one tree');
	return trees[0].tree;
}
const codes = (text: string) => parseNewick(text).remarks.map(({ level, code }) => `${level} ${code}`);

describe('parseNewick', () => {
	it('reads any tree into the arrays that plain recursion gives', () => {
		const lengths = fc.double({ min: 0, max: 1e6, noNaN: true });
		fc.assert(
			fc.property(nestedTrees(lengths), (nested) => {
				const { parent, length, childCount, label } = only(`${nestedText(nested)};`);
				expect({ parent, length, childCount, label }).toEqual(nestedArrays(nested));
			})
		);
	});

	// By hand: preorder is root, (A,B), A, B, C.
	it('numbers the nodes in preorder and keeps inner labels', () => {
		const tree = only('((A:1,B:1)95:1,C:2)root;');
		expect([...tree.parent]).toEqual([-1, 0, 1, 1, 0]);
		expect([...tree.childCount]).toEqual([2, 2, 0, 0, 0]);
		expect(tree.label).toEqual(['root', '95', 'A', 'B', 'C']);
	});

	it('shows an underscore as a blank only in an unquoted label and keeps every spelling', () => {
		const tree = only("(Homo_sapiens:1,'Pan_troglodytes':1,\"Tip_1\":1,'it''s [not] a (comment),\nno:;':1);");
		expect(tipLabels(tree)).toEqual(['Homo sapiens', 'Pan_troglodytes', 'Tip_1', "it's [not] a (comment), no:;"]);
		expect(tree.labelRaw.slice(1, 4)).toEqual(['Homo_sapiens', "'Pan_troglodytes'", '"Tip_1"']);
	});

	it('skips comments, nested ones and those with quote marks too', () => {
		const tree = only("[it's a [nested] tree](A[x]:[y]1[z],B:1)[end];[after]");
		expect(tipLabels(tree)).toEqual(['A', 'B']);
		expect([...tree.length]).toEqual([0, 1, 1]);
		expect(tree.annotations.size).toBe(0);
	});

	it('keeps metacomments on their node, with a prefix when they stand after the colon', () => {
		const { annotations } = only('((A[&a=1]:[&rate=0.5]1[&x="p,q"],B:1)[&height={1,2}][&p=3]:1,C:2)[&r=9];');
		expect(annotations.get(2)).toEqual({ a: '1', 'branch:rate': '0.5', 'branch:x': 'p,q' });
		expect(annotations.get(1)).toEqual({ height: '{1,2}', p: '3' });
		expect(annotations.get(0)).toEqual({ r: '9' });
		expect(annotations.size).toBe(3);
	});

	it.each([
		['[&R] (A:1,B:1);', true],
		['[&u](A:1,B:1);', false],
		['[&W 1/3](A:1,B:1);', undefined]
	])('takes the rooting of %s from its comment', (text, rooted) => expect(parseNewick(text).trees[0]?.rooted).toBe(rooted));

	it('reads several trees, with any line ends, and empty statements between them', () => {
		const { trees, remarks } = parseNewick('(A:1,B:1);\r\n(C:1,D:1);;\r(E:1,F:1);\n');
		expect(trees.map(({ tree }) => tipLabels(tree).join(''))).toEqual(['AB', 'CD', 'EF']);
		expect(remarks).toEqual([]);
	});

	it('keeps an ill-placed key such as __proto__ as plain text', () => {
		expect(Object.entries(only('(A[&__proto__=1]:1,B:1);').annotations.get(1) ?? {})).toEqual([['__proto__', '1']]);
	});

	it.each(['(', '(A,'])('reads 10,000 tips %s deep without a limit of depth', (opening) => {
		const inner = Array.from({ length: 9_998 }, (_, i) => `t${i}`);
		const text =
			opening === '('
				? `${'('.repeat(9_999)}x:1,y:1)${inner.map((tip) => `:1,${tip}:1)`).join('')};`
				: `(${inner.map((tip) => `${tip}:1,(`).join('')}x:1,y:1)${'):1'.repeat(9_998)};`;
		const tree = only(text);
		expect(tree.parent.length).toBe(2 * 10_000 - 1); // a binary tree of n tips has 2n - 1 nodes
	});
});

describe('parseNewick remarks', () => {
	it('counts missing lengths and points at the first', () => {
		const { remarks, trees } = parseNewick('(A:1,(B,C):1);\n(A:1,(B,C:1):1);');
		expect(trees[0]?.tree.length).toEqual(Float64Array.of(0, 1, 1, NaN, NaN));
		expect(remarks).toEqual([
			{
				level: 'settle',
				code: 'missing-length',
				message:
					'3 branches have no length, the first at line 1, column 7 ("B"). Ages of common ancestors need every length: bring the dated tree.',
				where: { line: 1, column: 7, tree: 0, name: 'B' }
			}
		]);
	});

	it.each([
		['(A:1,B:1)', 'look missing-semicolon'],
		['(A:1,B:1)\n(C:1,D:1);', 'look missing-semicolon'],
		['(((A:1,B:1):1):1,C:3);', 'information single-child'],
		['((A:1,B:1):1,C:2):3;', 'information root-length'],
		['(Homo sapiens:1,Pan  paniscus:1);', 'look blank-in-label'],
		['[&U](A:1,B:1);', 'look unrooted']
	])('says of %j: %s', (text, expected) => expect(codes(text)).toEqual([expected]));

	it('says nothing of a root branch of length 0 and stores 0 for any', () => {
		expect(codes('((A:1,B:1):1,C:2):0;')).toEqual([]);
		expect(only('((A:1,B:1):1,C:2):3;').length[0]).toBe(0);
	});

	it('joins the words of an unquoted label, so that two of one genus stay two', () => {
		expect(tipLabels(only('(Homo sapiens:1,Homo erectus:1);'))).toEqual(['Homo sapiens', 'Homo erectus']);
	});
});
