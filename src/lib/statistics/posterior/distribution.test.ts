import { describe, expect, it } from 'vitest';
import { distribution, shortestInterval } from './distribution.ts';

describe('distribution', () => {
	// By hand: 0 … 40 has steps of 1, so type-7 quantiles are 40 p; the mean is 20.
	it('gives mean and quantiles', () => {
		const { mean, quantiles } = distribution(Float64Array.from({ length: 41 }, (_, i) => i));
		expect(mean).toBe(20);
		expect(quantiles).toEqual([
			[0.025, 1],
			[0.25, 10],
			[0.5, 20],
			[0.75, 30],
			[0.975, 39]
		]);
	});
});

describe('shortestInterval', () => {
	// By hand: 3 of 4 values are 75 %; 5 to 6 is shorter than 0 to 5.5.
	it('is the shortest that holds the share', () => {
		expect(shortestInterval(Float64Array.of(6, 0, 5, 5.5), 0.75)).toEqual([5, 6]);
	});

	// By hand: 95 % of 20 values are 19 of them.
	it('asks for no value more than the share needs, and for one at least', () => {
		const values = Float64Array.from({ length: 20 }, (_, i) => (i === 19 ? 100 : i));
		expect(shortestInterval(values, 0.95)).toEqual([0, 18]);
		expect(shortestInterval(Float64Array.of(7), 0.95)).toEqual([7, 7]);
	});

	it('refuses an empty list and a value that is no number', () => {
		expect(() => shortestInterval(new Float64Array(0), 0.95)).toThrow('Expected at least 1 value for an interval; got 0.');
		expect(() => shortestInterval(Float64Array.of(1, NaN), 0.95)).toThrow('Expected value 2 to be a finite number; got NaN.');
	});
});
