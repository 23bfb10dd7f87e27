import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNewick } from './newick.ts';
import { nodeAges, nodeDepths } from './nodeAges.ts';
import { nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipIndices } from './tree.ts';
import { levelTips, tipSpread, ultrametricRemark, ultrametricSpread } from './ultrametric.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}

// By hand: (max - min) / max of the root-to-tip distances.
describe('ultrametricSpread', () => {
	it.each([
		['(A:1,B:2);', 0.5],
		['((A:1,B:1):1,C:2);', 0],
		['(A:0,B:0);', 0],
		['((A:1,B:2):8);', 0.5] // a stem is not part of the tree
	])('of %s is %d', (text, spread) => expect(ultrametricSpread(only(text))).toBe(spread));

	it('does not change with the unit', () => {
		expect(ultrametricSpread(only('(A:1000,B:2000);'))).toBe(ultrametricSpread(only('(A:1,B:2);')));
	});

	it('names the tips that end first and last', () => {
		expect(tipSpread(only('(A:2,B:1,C:3);'))).toEqual({ spread: 2 / 3, shallowest: 'B', deepest: 'C' });
	});
});

describe('ultrametricRemark', () => {
	// The bands: 1e-6, 1e-3 and 1e-2, each with its upper end.
	it.each([
		[0, 'information', 'ultrametric'],
		[1e-6, 'information', 'ultrametric'],
		[1.1e-6, 'information', 'spread-rounding'],
		[1e-3, 'information', 'spread-rounding'],
		[1.1e-3, 'settle', 'spread-needs-decision'],
		[1e-2, 'settle', 'spread-needs-decision'],
		[1.1e-2, 'settle', 'not-ultrametric'],
		[1, 'settle', 'not-ultrametric']
	])('puts %d at %s, %s', (spread, level, code) => expect(ultrametricRemark(spread)).toMatchObject({ level, code }));

	it('says how much, between whom, and what to do', () => {
		const { message, where } = ultrametricRemark(0.005, { shallowest: 'A', deepest: 'B', tree: 3 });
		expect(message).toBe(
			'Root-to-tip distances differ by 0.5 % of the longest ("A" ends first, "B" last). ' +
				'Confirm that all species live now, and the tips will be extended to the same time; or bring the exact tree.'
		);
		expect(where).toEqual({ name: 'A', otherName: 'B', tree: 3 });
	});

	it('refuses a spread that is no number', () => {
		expect(() => ultrametricRemark(NaN)).toThrow('Expected the spread of root-to-tip distances to be a finite number; got NaN.');
	});
});

describe('levelTips', () => {
	it('ends all tips together, lengthens only tips and leaves every inner age as it was', () => {
		const trees = nestedTrees(fc.double({ min: 0, max: 10, noNaN: true })).map((nested) => only(`${nestedText(nested)};`));
		fc.assert(
			fc.property(trees, (tree) => {
				const level = levelTips(tree);
				const isInner = (_: number, node: number) => tree.childCount[node] !== 0;
				expect(ultrametricSpread(level)).toBeLessThan(1e-12);
				expect(level.length.filter(isInner)).toEqual(tree.length.filter(isInner));
				for (const tip of tipIndices(tree)) expect(level.length[tip]).toBeGreaterThanOrEqual(tree.length[tip] ?? NaN);
				const latest = Math.max(...nodeDepths(tree));
				for (const [node, age] of nodeAges(level).entries())
					if (tree.childCount[node] !== 0)
						expect(Math.abs(age - (nodeAges(tree)[node] ?? NaN))).toBeLessThanOrEqual(latest * 1e-14);
			})
		);
	});

	it('leaves its argument alone', () => {
		const tree = only('(A:1,B:2);');
		expect([...levelTips(tree).length]).toEqual([0, 2, 2]);
		expect([...tree.length]).toEqual([0, 1, 2]);
	});
});
