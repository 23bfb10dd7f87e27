import { describe, expect, it } from 'vitest';
import { innerNodes, split, tip, tipNames, type Clade } from './clade.ts';
import { randomNumbers } from './randomNumbers.ts';
import { uncertainTrees } from './uncertainTrees.ts';

const THREE = split(10, [split(9.8, [tip('a'), tip('b')]), tip('c')]);
const PLAN = { count: 300, rootLogSd: 0.0554, nodeLogSd: 0.12, rearrangedShare: 0, shortBranchMyr: 1 };

function isOlderThanItsDaughters(clade: Clade): boolean {
	return clade.daughters.every((daughter) => daughter.ageMa < clade.ageMa && isOlderThanItsDaughters(daughter));
}

describe('uncertainTrees', () => {
	it('keeps every node younger than its parent, even when the two are nearly of one age', () => {
		const trees = uncertainTrees(THREE, PLAN, randomNumbers(2, 'dating'));
		expect(trees).toHaveLength(300);
		expect(trees.every(isOlderThanItsDaughters)).toBe(true);
		expect(trees.every((tree) => innerNodes(tree).length === 2)).toBe(true);
	});

	it('keeps the shape when no share is to be rearranged', () => {
		for (const tree of uncertainTrees(THREE, PLAN, randomNumbers(2, 'dating'))) expect(tipNames(tree)).toEqual(['a', 'b', 'c']);
	});

	// By hand: ((a,b),c) with a short branch above (a,b) becomes ((a,c),b).
	it('resolves a short branch the other way when asked to', () => {
		for (const tree of uncertainTrees(THREE, { ...PLAN, rearrangedShare: 1 }, randomNumbers(2, 'dating'))) {
			expect(tree.daughters.map(tipNames)).toEqual([['a', 'c'], ['b']]);
			expect(isOlderThanItsDaughters(tree)).toBe(true);
		}
	});

	it('leaves a tree without short branches as it is', () => {
		const rearrangeAll = { ...PLAN, rearrangedShare: 1, shortBranchMyr: 0.1 };
		for (const tree of uncertainTrees(THREE, rearrangeAll, randomNumbers(2, 'dating'))) {
			expect(tipNames(tree)).toEqual(['a', 'b', 'c']);
		}
	});

	// By plan: the mean of the logarithm of the roots is log 10; 4 standard errors of 300 draws are 4 × 0.0554 / sqrt(300).
	it('stretches the root log-normally around the age it had', () => {
		const logs = uncertainTrees(THREE, PLAN, randomNumbers(2, 'dating')).map((tree) => Math.log(tree.ageMa / 10));
		const mean = logs.reduce((sum, value) => sum + value, 0) / logs.length;
		expect(Math.abs(mean)).toBeLessThan((4 * 0.0554) / Math.sqrt(300));
	});
});
