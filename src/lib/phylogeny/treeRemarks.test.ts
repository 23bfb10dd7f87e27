import { describe, expect, it } from 'vitest';
import { readTrees } from './readTrees.ts';
import { treeRemarks, treeSetRemarks } from './treeRemarks.ts';
import type { Tree } from './tree.ts';

function only(text: string): Tree {
	const tree = readTrees(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}
const said = (text: string) => treeRemarks(only(text)).map(({ level, code }) => `${level} ${code}`);
const saidOfSet = (text: string) => treeSetRemarks(readTrees(text)).map(({ level, code }) => `${level} ${code}`);

describe('treeRemarks', () => {
	it.each([
		['((A:1,B:1):1,C:2);', ['information ultrametric']],
		['(A:1,B:1);', ['settle too-few-tips', 'information ultrametric']],
		['((A,B):1,C:2);', ['settle missing-length']],
		['(A:1,B:1,C:1);', ['information ultrametric', 'settle star-tree', 'information polytomies']],
		['((A:1,B:1):1,C:2.01);', ['settle spread-needs-decision']],
		['((A:1,B:1):1,C:3);', ['settle not-ultrametric']],
		['((A:0,B:0):0,C:0);', ['settle no-age', 'settle star-tree']],
		['(((A:1,B:1):1):1,C:3);', ['information ultrametric', 'information single-child']]
	])('of %s are %j', (text, expected) => expect(said(text)).toEqual(expected));

	it('carry the index of the tree', () => {
		expect(treeRemarks(only('(A:1,B:1,C:1);'), 4).map(({ where }) => where?.tree)).toEqual([4, 4, 4]);
	});
});

describe('treeSetRemarks', () => {
	it('say a thing once for all trees, with count and first tree, the gravest first', () => {
		const remarks = treeSetRemarks(readTrees('((A:1,B:1):1,C:2);\n(A:1,B:1,C:1);\n(A:2,B:2,C:2);'));
		expect(remarks.map(({ code }) => code)).toEqual(['star-tree', 'ultrametric', 'polytomies']);
		expect(remarks[0]?.message).toMatch(/^In 2 of 3 trees, the first being tree 2: All pairs of tips/);
		expect(remarks[0]?.where?.tree).toBe(1);
	});

	it('do not repeat what reading has said with its place', () => {
		expect(saidOfSet('((A,B):1,C:2);')).toEqual(['settle missing-length']);
	});

	it('say when trees do not share their tips', () => {
		const remarks = treeSetRemarks(readTrees('((A:1,B:1):1,C:2);((A:1,B:1):1,D:2);((A:1,B:1):1,C:2);'));
		expect(remarks[0]).toMatchObject({ level: 'look', code: 'tips-differ', where: { tree: 1 } });
		expect(remarks[0]?.message).toContain('1 tree differs from the first. Tree 2 has "D", which the first has not.');
		expect(treeSetRemarks(readTrees('((A:1,B:1):1,C:2,E:2);((A:1,B:1):1,C:2);'))[0]?.message).toContain('Tree 2 lacks "E".');
	});
});
