import { describe, expect, it } from 'vitest';
import { compensatedDot, compensatedSum } from './compensatedSum.ts';

describe('compensatedSum', () => {
	// By hand; the plain sum gives 0.
	it('keeps what a large neighbour would swallow', () => {
		expect(compensatedSum([1, 1e100, 1, -1e100])).toBe(2);
	});
});

describe('compensatedDot', () => {
	// By hand: (2^30 + 1)(2^30 - 1) = 2^60 - 1, which no double holds; the plain sum gives 0.
	it('keeps the rounding of the products', () => {
		const large = 2 ** 30;
		expect(compensatedDot([large + 1, large], [large - 1, -large])).toBe(-1);
	});
});
