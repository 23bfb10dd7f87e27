import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { exampleTree } from '../exampleTrees.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { cladeContrast } from './cladeContrast.ts';
import { cladesOf, groupOf } from './cladeList.ts';
import { smallestMembershipP } from './memberships.ts';

// Pairs AB, AC, BC, AD, BD, CD of four species worked by hand in exact fractions.
const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);

describe('cladeContrast', () => {
	// By hand: (.8 + .7 + .6) / 3 = 7/10 within A, B, C; (.4 + .4 + .5) / 3 = 13/30 with D; difference 4/15.
	it('averages the pairs inside and those with one member', () => {
		const { meanWithin, meanBetween, difference } = cladeContrast(overlap, 4, Int32Array.of(0, 1, 2));
		expect(meanWithin).toBeCloseTo(7 / 10, 14);
		expect(meanBetween).toBeCloseTo(13 / 30, 14);
		expect(difference).toBeCloseTo(4 / 15, 14);
	});

	it('has no mean within a single species, and none between when all belong', () => {
		expect(cladeContrast(overlap, 4, Int32Array.of(3))).toMatchObject({ meanWithin: null, difference: null });
		expect(cladeContrast(overlap, 4, Int32Array.of(0, 1, 2, 3))).toMatchObject({ meanBetween: null, difference: null });
	});
});

describe('cladesOf', () => {
	// Preorder of the tree: 0 root, 1 ABC, 2 AB, 3 A, 4 B, 5 C, 6 DE, 7 D, 8 E.
	const shape = treeShape(exampleTree('(((A:1,B:1):1,C:2):2,(D:1,E:1):3);'));

	it('lists clades of enough species, the whole tree apart', () => {
		expect(cladesOf(shape, 3).map(({ node, members }) => [node, ...members])).toEqual([[1, 0, 1, 2]]);
		expect(cladesOf(shape, 2).map(({ node }) => node)).toEqual([1, 2, 6]);
	});

	it('finds the node of a declared group that is a clade, in whatever order', () => {
		expect(groupOf(shape, [2, 0, 1])).toEqual({ node: 1, members: Int32Array.of(0, 1, 2) });
		expect(groupOf(shape, [1, 2])).toEqual({ node: null, members: Int32Array.of(1, 2) });
		expect(groupOf(shape, [0, 3]).node).toBeNull();
	});
});

describe('smallestMembershipP', () => {
	// By hand: C(4, 3) = 4; C(10, 2) = 45; C(20, 2) = 190.
	it('is one over the ways to choose the group', () => {
		expect(smallestMembershipP(4, 3)).toBe(1 / 4);
		expect(smallestMembershipP(10, 2)).toBe(1 / 45);
		expect(smallestMembershipP(20, 18)).toBe(1 / 190);
	});
});
