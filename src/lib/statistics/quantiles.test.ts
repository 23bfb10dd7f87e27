import { describe, expect, it } from 'vitest';
import { quantiles } from './quantiles.ts';

describe('quantiles', () => {
	// By hand: of 1, 2, 3, 4 the quarter stands at place 3 · 0.25 = 0.75, the median between 2 and 3.
	it('interpolates between neighbours and leaves its argument alone', () => {
		const values = Float64Array.of(3, 1, 4, 2);
		expect(quantiles(values, [0, 0.25, 0.5, 1])).toEqual([
			[0, 1],
			[0.25, 1.75],
			[0.5, 2.5],
			[1, 4]
		]);
		expect([...values]).toEqual([3, 1, 4, 2]);
	});

	it('refuses nothing, NaN and probabilities beyond 1', () => {
		expect(() => quantiles(new Float64Array(0), [0.5])).toThrow('Expected at least 1 value');
		expect(() => quantiles(Float64Array.of(1, Number.NaN), [0.5])).toThrow('Expected value 2 to be a finite number');
		expect(() => quantiles(Float64Array.of(1), [1.5])).toThrow('got 1.5');
	});
});
