import { describe, expect, it } from 'vitest';
import { readTrees } from './readTrees.ts';

describe('readTrees', () => {
	it.each(['', ' \r\n\t', '\uFEFF'])('refuses the empty text %j', (text) => {
		expect(() => readTrees(text)).toThrow(expect.objectContaining({ code: 'empty-text', where: { line: 1, column: 1 } }));
	});

	it.each([
		['(A:1,B:1);', 'newick'],
		['\uFEFF(A:1,B:1);', 'newick'],
		['#NEXUS\nbegin trees; tree t=(A:1,B:1); end;', 'nexus'],
		['\uFEFF \n#nexus[x] begin trees; tree t=(A:1,B:1); end;', 'nexus']
	])('sniffs %j as %s', (text, format) =>
		expect(readTrees(text)).toMatchObject({ format, trees: [{ tree: { label: ['', 'A', 'B'] } }] })
	);
});
