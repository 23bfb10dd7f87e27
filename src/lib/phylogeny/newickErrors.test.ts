import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { parseNewick } from './newick.ts';

function refusal(text: string): InputError {
	try {
		parseNewick(text);
	} catch (error) {
		if (error instanceof InputError) return error;
		throw error;
	}
	throw new Error('the text was read');
}

// The places are counted by hand in each text.
describe('parseNewick refuses', () => {
	it.each([
		['A,B;', 'not-a-tree', 'Expected a tree, which begins with "("; found "A" at line 1, column 1.'],
		['[only a comment]', 'not-a-tree', 'found the end of the text at line 1, column 17.'],
		['(A:1,B:1);\nmore', 'text-after-tree', 'Expected another tree or nothing after tree 1; found "more" at line 2, column 1.'],
		['(A:1,(B:1)x#H1:1);', 'network', '"x#H1" at line 1, column 11 marks a node with two, so this is a network.'],
		['(A:1,(B:1,y#LGT2:1):1);', 'network', '"y#LGT2" at line 1, column 11 marks'],
		['((A:1,B:1):1,C:2;', 'unbalanced-brackets', 'the "(" at line 1, column 1 is still open at line 1, column 17.'],
		['(A:1,\n(B:1,C:1', 'unbalanced-brackets', 'the "(" at line 2, column 1 is still open at line 2, column 9.'],
		['(A:1,', 'unbalanced-brackets', 'the "(" at line 1, column 1 is still open at line 1, column 6.'],
		['(A:1,B:1)):1;', 'unbalanced-brackets', 'Expected a "(" for every ")"; the ")" at line 1, column 10 closes nothing.'],
		['(A:1,B:1),C:1;', 'unbalanced-brackets', 'Expected every "," inside brackets; the one at line 1, column 10 is outside.'],
		[
			'(A[x[y]:1,B:1);',
			'unbalanced-comment',
			'Expected every comment to end with "]"; the "[" at line 1, column 3 is never closed.'
		],
		['(A]:1,B:1);', 'unbalanced-comment', 'the "]" at line 1, column 3 closes no comment.'],
		["(A:1,\n'B:1);", 'unbalanced-quote', 'Expected every quote mark to be closed; the one at line 2, column 1 never is.'],
		['(A:1,,B:1);', 'unnamed-tip', 'Expected every tip to have a name; found "," in its place at line 1, column 6.'],
		['(A:1,:1);', 'unnamed-tip', 'found ":" in its place at line 1, column 6.'],
		["(A:1,'':1);", 'unnamed-tip', 'Expected every tip to have a name; the one at line 1, column 6 is empty.'],
		['(A_b:1,\n(C:1,"A b":1):1);', 'duplicate-tip', '"A b" stands at line 1, column 2 and again at line 2, column 6.'],
		["(D'orb':1,B:1);", 'two-labels', 'found "D" and \'orb\' at line 1, column 3.'],
		["('a' 'b':1,C:1);", 'two-labels', "found \"'a'\" and 'b' at line 1, column 6."],
		['(A:1 B:1);', 'missing-comma', 'found "B" at line 1, column 6.'],
		['((A:1,B:1)(C:1,D:1));', 'missing-comma', 'found "(" at line 1, column 11.'],
		['(A:1,B:x);', 'bad-length', 'Expected a number for the length of tip "B"; found "x" at line 1, column 8.'],
		['(A:1,B:NaN);', 'bad-length', 'found "NaN" at line 1, column 8.'],
		['(A:1,B:1e999);', 'bad-length', 'found "1e999" at line 1, column 8.'],
		['(A:1,B:);', 'bad-length', 'found ")" at line 1, column 8.'],
		['(A:1,B:', 'bad-length', 'found the end of the text at line 1, column 8.'],
		['(A:1:2,B:1);', 'bad-length', 'Expected one length for each branch; a second ":" stands at line 1, column 5.'],
		['(A:1,B:-0.3);', 'negative-length', 'Expected every branch length to be at least 0; tip "B" has -0.3 at line 1, column 8.'],
		['((A:1,B:1):-1,C:1);', 'negative-length', 'the clade that opens at line 1, column 2 has -1 at line 1, column 12.']
	])('%j: %s', (text, code, sentence) => {
		const error = refusal(text);
		expect(error.code).toBe(code);
		expect(error.message).toContain(sentence);
		const { line, column } = error.where ?? {};
		expect(error.message).toContain(`line ${line}, column ${column}`);
	});

	it('a tree of too many tips, with limit and figure', () => {
		const tips = Array.from({ length: 10_003 }, (_, i) => `t${i}:1`);
		const error = refusal(`(x:1,y:1);\n(${tips.join(',')});`);
		expect(error.code).toBe('too-many-tips');
		expect(error.message).toBe('Expected at most 10,000 tips in a tree; tree 2, which begins at line 2, column 1, has 10,003.');
	});

	it('a text of too many trees, with limit and figure', () => {
		const error = refusal('(A:1,B:1);\n'.repeat(10_005));
		expect(error.code).toBe('too-many-trees');
		expect(error.message).toContain(
			'Expected at most 10,000 trees in a text; found 10,005, the first too many at line 10001, column 1.'
		);
	});

	it('a text of nothing but brackets, before it fills the memory', () => {
		expect(refusal('('.repeat(1_000_001)).code).toBe('too-many-nodes');
	});
});

describe('parseNewick accepts', () => {
	it('the limits themselves', () => {
		const tips = Array.from({ length: 10_000 }, (_, i) => `t${i}:1`);
		expect(parseNewick(`(${tips.join(',')});`).trees[0]?.tree.parent.length).toBe(10_001);
		expect(parseNewick('(A:1,B:1);\n'.repeat(10_000)).trees.length).toBe(10_000);
	});

	it('a number sign that marks no network, and minus zero as zero', () => {
		const tree = parseNewick("(isolate#12:-0,'x#H1':1);").trees[0]?.tree;
		expect(tree?.label).toEqual(['', 'isolate#12', 'x#H1']);
		expect(tree?.length[1]).toBe(0);
	});
});
