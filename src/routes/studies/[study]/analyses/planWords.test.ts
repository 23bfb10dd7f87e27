import { describe, expect, it } from 'vitest';
import { ALTERNATIVES, STATISTICS } from '#lib/contracts/plan.ts';
import { ALTERNATIVE_CHOICES, measureWords, proposedShuffles, STATISTIC_CHOICES, treeWords, wordsOf } from './planWords.ts';

describe('the words of a plan', () => {
	it('offer every statistic and every direction', () => {
		expect(STATISTIC_CHOICES.map(({ value }) => value)).toEqual([...STATISTICS]);
		expect(ALTERNATIVE_CHOICES.map(({ value }) => value)).toEqual([...ALTERNATIVES]);
	});

	// By hand, from the sentence of the design.
	it('read as parts of one sentence', () => {
		expect(treeWords({ label: 'summary tree', treeCount: 1 }, 0)).toBe('the summary tree');
		expect(treeWords({ label: 'Summary tree', treeCount: 1 }, 0)).toBe('the summary tree');
		expect(treeWords({ label: 'Darwin tree', treeCount: 1 }, 0)).toBe('the Darwin tree');
		expect(treeWords({ label: 'The dated tree', treeCount: 1 }, 0)).toBe('The dated tree');
		expect(treeWords({ label: 'posterior', treeCount: 200 }, 7)).toBe('tree 7 of “posterior”');
		expect(treeWords({ label: 'posterior', treeCount: 1200 }, 'all')).toBe('all 1,200 trees of “posterior”');
		expect(treeWords({ label: 'summary tree', treeCount: 1 }, 'all')).toBe('the summary tree');
		expect(wordsOf(STATISTIC_CHOICES, 'slope')).toBe('the slope over all pairs');
	});

	it('do not name a measure twice', () => {
		expect(measureWords({ measure: 'schoener-d', label: 'shared cells' })).toBe('Schoener’s D of “shared cells”');
		expect(measureWords({ measure: 'schoener-d', label: "Schoener's D at 2.5′" })).toBe("Schoener's D at 2.5′");
	});

	// The limit of 200 species is the design’s.
	it('propose fewer shuffles for many species', () => {
		expect(proposedShuffles(200)).toBe(99_999);
		expect(proposedShuffles(201)).toBe(9_999);
	});
});
