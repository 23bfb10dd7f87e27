import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { parseNexus } from './nexus.ts';
import { tipLabels } from './tree.ts';

const block = (...commands: string[]) => `#NEXUS\nBEGIN TREES;\n${commands.map((command) => `${command};\n`).join('')}END;\n`;
const tips = (text: string) => parseNexus(text).trees.map(({ tree }) => tipLabels(tree));

function refusal(text: string): InputError {
	try {
		parseNexus(text);
	} catch (error) {
		if (error instanceof InputError) return error;
		throw error;
	}
	throw new Error('the text was read');
}

// Every expected tree is read off its text by hand, by the rules of the TREES block.
describe('parseNexus', () => {
	it('translates numbers, words and quoted keys, with a comma too many', () => {
		const table = "translate 1 Homo_sapiens, ten 'Pan (x)', 'k y' \"C_d\",";
		expect(tips(block(table, "tree a=((1:1,ten:1):1,'k y':2)"))).toEqual([['Homo sapiens', 'Pan (x)', 'C_d']]);
	});

	it('looks a tip up in TRANSLATE, then among the names, then by its number', () => {
		const taxa = '#nexus\nbegin taxa; dimensions ntax=4; taxlabels A 1 C D; end;\n';
		// 2 is a key; 1 is a name; 3 is the third name; D is a name.
		expect(tips(`${taxa}begin trees; translate 2 Z; tree t=((2:1,1:1):1,(3:1,D:1):1); end;`)).toEqual([['Z', '1', 'C', 'D']]);
	});

	it('reads names, rooting and the default mark', () => {
		const { trees } = parseNexus(
			block(
				"TREE * 'best tree' [&lnP=-1] = [&R] [&W 1/3] (A:1,B:1)",
				'tree STATE_0=[&U](A:1,B:1)',
				'UTREE u = (A:1,B:1)',
				'tree *d=(A:1,B:1)'
			)
		);
		expect(trees.map(({ name, rooted, isDefault }) => ({ name, rooted, isDefault }))).toEqual([
			{ name: 'best tree', rooted: true, isDefault: true },
			{ name: 'STATE 0', rooted: false, isDefault: undefined },
			{ name: 'u', rooted: false, isDefault: undefined },
			{ name: 'd', rooted: undefined, isDefault: true }
		]);
	});

	it('reads several blocks, each with its own table', () => {
		const two = `${block('translate 1 A, 2 B', 'tree x=(1:1,2:1)')}begin trees; translate 1 C, 2 D; tree x=(1:1,2:1); endblock;`;
		expect(tips(two)).toEqual([
			['A', 'B'],
			['C', 'D']
		]);
	});

	it('skips blocks and commands it does not know, whatever they hold', () => {
		const other = "begin data; matrix a 01[;'] 'x;y' (]; tree t=(P:1,Q:1); end; begin notes; text it's; end;\n";
		const trees = 'Begin Trees; Title z; LINK Taxa = T; tree t=(A:1,B:1); End;';
		expect(tips(`#NEXUS ${other}${trees}`)).toEqual([['A', 'B']]);
	});

	it('keeps metacomments of the tree itself', () => {
		const { trees } = parseNexus(block('translate 1 A, 2 B', 'tree a=[&R] (1[&rate=2]:1,2:1)[&height=1]'));
		expect(trees[0]?.tree.annotations).toEqual(
			new Map([
				[1, { rate: '2' }],
				[0, { height: '1' }]
			])
		);
	});

	it('says which trees the file calls unrooted and which words the table lacks', () => {
		const { remarks } = parseNexus(block('translate 1 A', 'utree u=(1:1,B:1)'));
		expect(remarks.map(({ level, code, where }) => [level, code, where?.line])).toEqual([
			['look', 'not-in-translate', 4],
			['look', 'unrooted', 4]
		]);
	});
});

describe('parseNexus refuses', () => {
	it.each([
		['#NEXUS\nbegin data;\nend;', 'no-trees-block', 'Expected a TREES block ("begin trees;"); the text ends at line 3, column 5'],
		[block('title x'), 'no-trees', 'Expected a TREE command in the TREES block; the text ends at line 5, column 1'],
		[block('translate 1 A, 2 B', 'tree t=(1:1,3:1)'), 'not-in-translate', '"3" at line 4, column 13 is not among the 2 keys.'],
		[
			block('translate 1 A, 1 B'),
			'bad-translate',
			'Expected every key of TRANSLATE once; "1" stands again at line 3, column 16.'
		],
		[block('translate 1 A B'), 'bad-translate', 'Expected "," or ";" in TRANSLATE; found "B" at line 3, column 15.'],
		[block('translate 1'), 'bad-translate', 'Expected a label for the key "1" in TRANSLATE; found ";" at line 3, column 12.'],
		[block('translate ,'), 'bad-translate', 'Expected a key in TRANSLATE; found "," at line 3, column 11.'],
		[block('tree t=A'), 'not-a-tree', 'Expected "(" after the "=" of tree "t"; found "A" at line 3, column 8.'],
		[block('tree t (A:1,B:1)'), 'not-a-tree', 'Expected "=" after the name of tree "t"; found "(" at line 3, column 8.'],
		[
			'#NEXUS begin trees; tree t=(A:1,B:1)\nend;',
			'missing-semicolon',
			'Expected ";" at the end of tree "t", which begins at line 1, column 28.'
		],
		[
			block('translate 1 A, 2 A', 'tree t=(1:1,2:1)'),
			'duplicate-tip',
			'"A" stands at line 4, column 9 and again at line 4, column 13.'
		],
		[block('tree t=(A:1,B:1'), 'unbalanced-brackets', 'the "(" at line 3, column 8 is still open at line 3, column 16.']
	])('%j: %s', (text, code, sentence) => {
		const error = refusal(text);
		expect(error.code).toBe(code);
		expect(error.message).toContain(sentence);
	});

	it('too many trees, with limit and figure', () => {
		const error = refusal(block(...Array.from({ length: 10_002 }, (_, i) => `tree t${i}=(A:1,B:1)`)));
		expect(error.code).toBe('too-many-trees');
		expect(error.message).toContain(
			'Expected at most 10,000 trees in a text; found 10,002, the first too many at line 10003, column'
		);
	});
});
