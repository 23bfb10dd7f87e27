import { describe, expect, it } from 'vitest';
import { normalTail, pearsonThreeTail } from './momentTails.ts';

describe('normalTail', () => {
	// Published: Abramowitz & Stegun (1964) table 26.1: P(1.96) = 0.9750021, P(1) = 0.8413447461; values from memory.
	it('agrees with the printed table', () => {
		expect(normalTail(1.96)).toBeCloseTo(0.9750021, 7);
		expect(normalTail(1)).toBeCloseTo(0.8413447461, 9);
		expect(normalTail(0)).toBe(0.5);
	});

	// Published: upper tail at 10 is 7.619853024e-24; value from memory.
	it('keeps its digits far out', () => {
		expect(normalTail(-10) / 7.619853024160527e-24).toBeCloseTo(1, 10);
	});

	it('mirrors', () => {
		expect(normalTail(-1.3) + normalTail(1.3)).toBeCloseTo(1, 15);
	});
});

describe('pearsonThreeTail', () => {
	// By hand: skewness 2 is the exponential curve moved to mean 0: P(Z <= z) = 1 - exp(-(z + 1)).
	it('is exponential at skewness 2', () => {
		expect(pearsonThreeTail(0.4, 2)).toBeCloseTo(1 - Math.exp(-1.4), 14);
		expect(pearsonThreeTail(-1.5, 2)).toBe(0);
	});

	it('turns over when the skewness changes its sign', () => {
		expect(pearsonThreeTail(-0.7, -1.2) + pearsonThreeTail(0.7, 1.2)).toBeCloseTo(1, 14);
	});

	it('approaches the normal curve as the skewness vanishes', () => {
		expect(pearsonThreeTail(-1.5, 2e-4)).toBeCloseTo(normalTail(-1.5), 4);
		expect(pearsonThreeTail(-1.5, 0)).toBe(normalTail(-1.5));
	});
});
