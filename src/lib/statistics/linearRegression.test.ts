import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { fitLine, linearRegression } from './linearRegression.ts';

const codeOf = (run: () => unknown): string => {
	try {
		run();
	} catch (error) {
		if (error instanceof InputError) return error.code;
		throw error;
	}
	return 'none';
};

describe('linearRegression', () => {
	// By hand: means 2 and 5/3; Sxx 2, Sxy -3, Syy 14/3; residual SS 14/3 - 9/2 = 1/6 on one degree of freedom.
	it('fits three points', () => {
		const line = linearRegression([1, 2, 3], [3, 2, 0]);
		expect(line.slope).toBeCloseTo(-3 / 2, 14);
		expect(line.intercept).toBeCloseTo(14 / 3, 14);
		expect(line.r).toBeCloseTo(-3 / Math.sqrt(28 / 3), 14);
		expect(line.rSquared).toBeCloseTo(27 / 28, 14);
		expect(line.residualStandardDeviation).toBeCloseTo(Math.sqrt(1 / 6), 14);
	});

	it('has no residual standard deviation with two points', () => {
		expect(linearRegression([1, 2], [3, 5])).toMatchObject({ slope: 2, intercept: 1, residualStandardDeviation: null });
	});

	it('gives a slope divided by c, and the same r, when ages are multiplied by c', () => {
		const points = fc.array(fc.tuple(fc.integer({ min: 1, max: 1000 }), fc.integer({ min: 0, max: 1000 })), {
			minLength: 3,
			maxLength: 30
		});
		fc.assert(
			fc.property(points, fc.integer({ min: 2, max: 1000 }), (drawn, factor) => {
				const ages = drawn.map(([x]) => x);
				const overlaps = drawn.map(([, y]) => y / 1000);
				fc.pre(new Set(ages).size > 1 && new Set(overlaps).size > 1);
				const plain = linearRegression(ages, overlaps);
				const scaled = linearRegression(
					ages.map((x) => x * factor),
					overlaps
				);
				expect(scaled.slope * factor).toBeCloseTo(plain.slope, 12);
				expect(scaled.r).toBeCloseTo(plain.r, 12);
			})
		);
	});

	it('refuses what has no line', () => {
		expect(codeOf(() => linearRegression([2, 2, 2], [1, 2, 3]))).toBe('constant-ages');
		expect(codeOf(() => linearRegression([1, 2, 3], [5, 5, 5]))).toBe('constant-overlap');
		expect(codeOf(() => linearRegression([1], [2]))).toBe('too-few-points');
		expect(codeOf(() => linearRegression([1, Number.NaN], [2, 3]))).toBe('non-finite');
		expect(codeOf(() => linearRegression([1, 2], [2, Number.POSITIVE_INFINITY]))).toBe('non-finite');
	});

	// A star tree read from a file: root-to-tip distances that differ in the tenth digit.
	it('takes ages that differ by rounding for one age', () => {
		expect(codeOf(() => linearRegression([10, 10.000000001, 10.000000002], [1, 2, 3]))).toBe('constant-ages');
	});
});

describe('fitLine', () => {
	it('gives a flat line through equal values', () => {
		expect(fitLine([1, 2, 3], [0.5, 0.5, 0.5])).toEqual({ slope: 0, intercept: 0.5, rSquared: 0 });
	});
});
