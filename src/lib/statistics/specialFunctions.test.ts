import { describe, expect, it } from 'vitest';
import { incompleteGamma, lnGamma } from './specialFunctions.ts';

describe('lnGamma', () => {
	// By hand: 9! = 362,880; Γ(1/2) = √π; ln Γ(1) = 0.
	it.each([
		[10, Math.log(362_880)],
		[0.5, Math.log(Math.PI) / 2],
		[1, 0]
	])('at %d', (x, expected) => {
		expect(lnGamma(x)).toBeCloseTo(expected, 13);
	});
});

describe('incompleteGamma', () => {
	// By hand: with shape 1 the upper tail is e^-x.
	it.each([0.1, 1, 2, 5, 30, 500])('is exponential with shape 1, at %d', (x) => {
		expect(incompleteGamma(1, x).upper / Math.exp(-x)).toBeCloseTo(1, 12);
	});

	it('adds up to 1', () => {
		for (const shape of [0.5, 3, 40, 1e6]) {
			for (const x of [shape / 2, shape, shape + 1, shape * 1.5]) {
				const { lower, upper } = incompleteGamma(shape, x);
				expect(lower + upper).toBeCloseTo(1, 14);
			}
		}
	});
});
