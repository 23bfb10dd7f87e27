import { describe, expect, it } from 'vitest';
import { smallestPWith } from './smallestPWith.ts';

describe('smallestPWith', () => {
	// By hand: 1 / (999 + 1) and, for both tails, 2 / (9,999 + 1).
	it('is one over the shuffles and the arrangement observed, doubled for both tails', () => {
		expect(smallestPWith({ smallestP: 0.0001, exact: false, permutations: 9999 }, 999, 1)).toBe(0.001);
		expect(smallestPWith({ smallestP: 0.0002, exact: false, permutations: 9999 }, 9999, 2)).toBe(0.0002);
	});

	// By hand: a tree of 4 species in two cherries has 8 symmetries among 24 relabellings, so p is never below 1/3.
	it('stays where the symmetry of the tree keeps it', () => {
		expect(smallestPWith({ smallestP: 1 / 3, exact: false, permutations: 999 }, 999_999, 1)).toBe(1 / 3);
	});

	it('does not depend on the number of shuffles when every relabelling is used', () => {
		expect(smallestPWith({ smallestP: 0.004, exact: true, permutations: 99_999 }, 999, 1)).toBe(0.004);
	});
});
