import { describe, expect, it } from 'vitest';
import { groupName, whyNotBeyond, whyNotTestable } from './cladeWords.ts';

// Expected sentences are written by hand; C(10, 2) = 45, C(7, 5) = 21, C(5, 3) = 10.
describe('the reasons why a clade could not be marked', () => {
	it('tell the ways, and what they come to among several clades', () => {
		const ways = { tips: 2, among: 10, smallestP: 1 / 45, smallestAdjustedP: 0.13, clades: 9 };
		expect(whyNotTestable(ways)).toBe(
			'Too few ways to choose 2 of the 10 species: p cannot be below 0.022, which is 0.13 for one of 9 clades.'
		);
		expect(whyNotTestable({ ...ways, clades: 1 })).toMatch(/0\.022\.$/);
	});

	it('tell the ways inside the clade above, and that many clades are asked about where that decides', () => {
		expect(whyNotBeyond({ tips: 3, among: 5, smallestP: 1 / 10, alpha: 0.05 })).toBe(
			'Too few ways to choose 3 of the 5 species of the clade above: p cannot be below 0.10.'
		);
		expect(whyNotBeyond({ tips: 5, among: 7, smallestP: 1 / 21, alpha: 0.05 })).toContain(
			'below 0.048, too large where so many clades are asked about.'
		);
	});
});

describe('groupName', () => {
	it('lists up to three species and counts more', () => {
		expect(groupName(['a', 'b', 'c'])).toBe('a, b, c');
		expect(groupName(['a', 'b', 'c', 'd'])).toBe('a, b and 2 more');
	});
});
