import { describe, expect, it } from 'vitest';
import { incompleteBeta, incompleteGamma, lnGamma } from './specialFunctions.ts';

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

describe('incompleteBeta', () => {
	// By hand: I_x(1, b) = 1 - (1 - x)^b and I_x(a, 1) = x^a.
	it('has its closed forms', () => {
		for (const x of [0.01, 0.3, 0.7, 0.99]) {
			expect(incompleteBeta(x, 1, 5)).toBeCloseTo(1 - (1 - x) ** 5, 13);
			expect(incompleteBeta(x, 7, 1)).toBeCloseTo(x ** 7, 13);
		}
		expect([incompleteBeta(0, 2, 3), incompleteBeta(1, 2, 3)]).toEqual([0, 1]);
	});

	// By hand: I_x(a, n-a+1) = P(at least a successes of n); a = 2, n = 4, x = 0.3: 6·.09·.49 + 4·.027·.7 + .0081 = .3483.
	it('is a binomial tail', () => {
		expect(incompleteBeta(0.3, 2, 3)).toBeCloseTo(0.3483, 13);
	});
});
