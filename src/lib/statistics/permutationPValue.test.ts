import { describe, expect, it } from 'vitest';
import { monteCarloError, permutationPValue, smallestAttainableP } from './permutationPValue.ts';

describe('permutationPValue', () => {
	// By hand: (2 + 1) / (4 + 1) and (3 + 1) / (4 + 1); twice the smaller is above 1.
	it('counts the observed arrangement among the shuffles', () => {
		expect(permutationPValue({ less: 2, greater: 3 }, 4, false)).toEqual({ pLess: 3 / 5, pGreater: 4 / 5, pTwoSided: 1 });
	});

	// By hand: 2 of 24, doubled 4 of 24.
	it('divides by all arrangements when they were enumerated', () => {
		expect(permutationPValue({ less: 2, greater: 24 }, 24, true)).toEqual({ pLess: 2 / 24, pGreater: 1, pTwoSided: 4 / 24 });
	});

	it('is never 0, and 1 without shuffles', () => {
		expect(permutationPValue({ less: 0, greater: 999 }, 999, false).pLess).toBe(1 / 1000);
		expect(permutationPValue({ less: 0, greater: 0 }, 0, false).pLess).toBe(1);
	});

	it('refuses counts that cannot be', () => {
		expect(() => permutationPValue({ less: 0, greater: 24 }, 24, true)).toThrow('A tail of 0 among 24');
		expect(() => permutationPValue({ less: 5, greater: 1 }, 4, false)).toThrow('A tail of 5 among 4');
	});
});

describe('monteCarloError', () => {
	// By hand: sqrt(.05 · .95 / 9999) = .00218.
	it('is the binomial standard error', () => {
		expect(monteCarloError(0.05, 9999)).toBeCloseTo(0.00218, 5);
	});
});

describe('smallestAttainableP', () => {
	// By hand: a ladder of four species has one cherry, so 2 of its 24 arrangements look alike.
	const ladder = { lnArrangements: Math.log(24), lnAutomorphisms: Math.log(2), shuffles: 9999 };

	it('is |Aut| / n! when exact', () => {
		expect(smallestAttainableP({ ...ladder, exact: true })).toBeCloseTo(1 / 12, 14);
	});

	it('is the larger of |Aut| / n! and 1 / (m + 1) with shuffles', () => {
		expect(smallestAttainableP({ ...ladder, exact: false })).toBeCloseTo(1 / 12, 14);
		expect(smallestAttainableP({ ...ladder, lnArrangements: 300, exact: false })).toBe(1 / 10_000);
	});
});
