import { describe, expect, it } from 'vitest';
import { linearRegression } from './linearRegression.ts';
import { multipleRegression } from './multipleRegression.ts';

describe('multipleRegression', () => {
	const ages = [0.5, 1.1, 2.4, 3.3, 4.7, 5.9];
	const overlaps = [0.89, 0.62, 0.8, 0.77, 0.65, 0.34];

	it('is the simple regression with one column', () => {
		const simple = linearRegression(ages, overlaps);
		const { coefficients, rSquared, residualStandardDeviation } = multipleRegression([ages], overlaps);
		expect(coefficients[0]).toBeCloseTo(simple.intercept, 14);
		expect(coefficients[1]).toBeCloseTo(simple.slope, 14);
		expect(rSquared).toBeCloseTo(simple.rSquared, 14);
		expect(residualStandardDeviation).toBeCloseTo(simple.residualStandardDeviation ?? Number.NaN, 14);
	});

	// By property: least squares leaves residuals that no column explains.
	it('leaves residuals at right angles to every column', () => {
		const distances = [1, 3, 2, 7, 6, 4];
		const { residuals } = multipleRegression([ages, distances], overlaps);
		for (const column of [ages, distances, ages.map(() => 1)]) {
			expect(residuals.reduce((sum, r, i) => sum + r * (column[i] ?? 0), 0)).toBeCloseTo(0, 14);
		}
	});

	it('names the predictor that repeats those before it', () => {
		const twice = ages.map((age) => 2 * age + 1);
		expect(() => multipleRegression([ages, twice], overlaps)).toThrow('predictor 2 is constant or a combination');
		expect(() => multipleRegression([ages.map(() => 3)], overlaps)).toThrow('predictor 1 is constant');
	});

	it('refuses fewer rows than coefficients and what is not finite', () => {
		expect(() => multipleRegression([[1, 2]], [1, 2])).toThrow('Expected more rows than the 2 coefficients to estimate; got 2.');
		expect(() => multipleRegression([[1, 2, Number.NaN]], [1, 2, 3])).toThrow('to be a finite number; got NaN.');
	});
});
