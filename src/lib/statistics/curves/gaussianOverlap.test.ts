import { describe, expect, it } from 'vitest';
import { gaussianOverlap, tabulatedOverlap } from './gaussianOverlap.ts';

// Closed forms of two unit Gaussians by distance, each checked by quadrature to nine digits when the methods were derived.
const BY_DISTANCE = [
	[0, 1, 1],
	[0.5, 0.802587348634, 0.969233234476],
	[1, 0.617075077452, 0.882496902585],
	[2, 0.317310507863, 0.606530659713],
	[3, 0.133614402538, 0.324652467358],
	[4, 0.045500263896, 0.135335283237]
] as const;

describe('gaussianOverlap', () => {
	it.each(BY_DISTANCE)('gives D and I of centres %d widths apart', (distance, d, i) => {
		expect(gaussianOverlap('schoener-d', distance)).toBeCloseTo(d, 11);
		expect(gaussianOverlap('warren-i', distance)).toBeCloseTo(i, 11);
	});

	it('takes the Mahalanobis distance of several axes', () => {
		// Covariance [[1, .5], [.5, 2]], centres (1, 2) apart: M² = 16/7, by hand; overlaps by quadrature.
		expect(gaussianOverlap('schoener-d', Math.sqrt(16 / 7))).toBeCloseTo(0.449691797969, 11);
		expect(gaussianOverlap('warren-i', Math.sqrt(16 / 7))).toBeCloseTo(0.751477293075, 11);
	});
});

describe('tabulatedOverlap', () => {
	it.each(['schoener-d', 'warren-i'] as const)('stays within 1e-10 of the closed form of %s, also far apart', (measure) => {
		const table = tabulatedOverlap(measure);
		for (let distance = 0; distance < 20; distance += 0.0137) {
			expect(Math.abs(table(distance) - gaussianOverlap(measure, distance))).toBeLessThan(1e-10);
		}
	});
});
