import { describe, expect, it } from 'vitest';
import { AXES, expectedOverlap, halfOverlapTheta, overlapFallRate } from './randomWalkFall.ts';

// θ, E[D] and E[I] with one axis, the same with two: derived for this project, 4e6 draws agree to 3-4 digits.
const BY_THETA = [
	[0.01, 0.936548965139, 0.99503719021, 0.900496280979, 0.990099009901],
	[0.1, 0.805017770958, 0.953462589246, 0.698488655422, 0.909090909091],
	[0.25, 0.704832764699, 0.894427191, 0.5527864045, 0.8],
	[0.5, 0.608173447969, 0.816496580928, 0.42264973081, 0.666666666667],
	[1, 0.5, 0.707106781187, 0.292893218813, 0.5],
	[2, 0.391826552031, 0.57735026919, 0.183503419072, 0.333333333333],
	[4, 0.295167235301, 0.4472135955, 0.105572809, 0.2],
	[10, 0.194982229042, 0.301511344578, 0.046537410754, 0.090909090909]
] as const;

describe('expectedOverlap', () => {
	it.each(BY_THETA)('follows the closed forms at θ = %d', (theta, ...expected) => {
		const [d1, i1, d2, i2] = expected;
		expect(expectedOverlap('schoener-d', 1, theta)).toBeCloseTo(d1, 11);
		expect(expectedOverlap('warren-i', 1, theta)).toBeCloseTo(i1, 11);
		expect(expectedOverlap('schoener-d', 2, theta)).toBeCloseTo(d2, 11);
		expect(expectedOverlap('warren-i', 2, theta)).toBeCloseTo(i2, 11);
	});

	// R 4.2: 2 * pt(sqrt(4 * theta), 4, lower.tail = FALSE)
	it.each([
		[0.01, 0.851237014136922],
		[0.25, 0.373900966300059],
		[1, 0.116116523516816],
		[10, 0.003198202152335306]
	])('is twice the upper tail of t with four axes at θ = %d', (theta, expected) => {
		expect(expectedOverlap('schoener-d', 4, theta)).toBeCloseTo(expected, 14);
	});

	it('begins at 1 and never rises', () => {
		for (const measure of ['schoener-d', 'warren-i'] as const) {
			for (const axes of AXES) {
				expect(expectedOverlap(measure, axes, 0)).toBe(1);
				for (let theta = 1e-6; theta < 1e9; theta *= 3) {
					expect(expectedOverlap(measure, axes, 3 * theta)).toBeLessThan(expectedOverlap(measure, axes, theta));
				}
			}
		}
	});
});

describe('overlapFallRate', () => {
	it('is the derivative of the expected overlap by ln θ', () => {
		const step = 1e-5;
		for (const measure of ['schoener-d', 'warren-i'] as const) {
			for (const axes of AXES) {
				for (const theta of [0.001, 0.3, 1, 20]) {
					const [after, before] = [step, -step].map((s) => expectedOverlap(measure, axes, theta * Math.exp(s)));
					const rate = ((after ?? 0) - (before ?? 0)) / (2 * step);
					expect(overlapFallRate(measure, axes, theta)).toBeCloseTo(rate, 8);
				}
			}
		}
	});
});

describe('halfOverlapTheta', () => {
	// By hand: atan 1 = π/4; θ/(1 + θ) = 1/4; (1 + θ)^(-d/2) = 1/2.
	it.each([
		['schoener-d', 1, 1],
		['schoener-d', 2, 1 / 3],
		['warren-i', 1, 3],
		['warren-i', 2, 1],
		['warren-i', 4, Math.SQRT2 - 1]
	] as const)('for %s with %d axes', (measure, axes, theta) => {
		expect(halfOverlapTheta(measure, axes)).toBeCloseTo(theta, 14);
	});

	it('is where the curve passes one half', () => {
		for (const axes of AXES)
			expect(expectedOverlap('schoener-d', axes, halfOverlapTheta('schoener-d', axes))).toBeCloseTo(0.5, 14);
	});
});
