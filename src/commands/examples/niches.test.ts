import { describe, expect, it } from 'vitest';
import { split, tip } from './clade.ts';
import { expectedOverlap } from './expectedOverlap.ts';
import { independentNiches, inheritedNiches } from './niches.ts';
import { randomNumbers } from './randomNumbers.ts';

const WIDTHS = { medianWidth: 0.6, widthLogSd: 0.25 };
const TREE = split(8, [split(2, [tip('a'), tip('b')]), tip('c')]);
const RUNS = 4000;

function varianceOf(values: readonly number[]): number {
	const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
	return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
}

describe('inheritedNiches', () => {
	const random = randomNumbers(4, 'walks');
	const runs = Array.from({ length: RUNS }, () => inheritedNiches(TREE, 0.05, WIDTHS, random));
	const gaps = (first: number, second: number, climate: 0 | 1): number[] =>
		runs.map((niches) => (niches[first]?.centre[climate] ?? NaN) - (niches[second]?.centre[climate] ?? NaN));

	// Brownian motion: the difference of two tips has variance 2 v t, here 2 × 0.05 × 2 = 0.2 and 2 × 0.05 × 8 = 0.8 on each
	// climate; 4 standard errors of a variance of 4,000 normal draws are 4 sqrt(2 / 4000) = 9 %.
	it('parts two species by 2 v t on each climate', () => {
		for (const climate of [0, 1] as const) {
			expect(Math.abs(varianceOf(gaps(0, 1, climate)) / 0.2 - 1)).toBeLessThan(0.09);
			expect(Math.abs(varianceOf(gaps(0, 2, climate)) / 0.8 - 1)).toBeLessThan(0.09);
		}
	});

	it('draws widths log-normally around their median', () => {
		const logs = runs.flatMap((niches) => niches.flatMap(({ width }) => width.map((value) => Math.log(value / 0.6))));
		expect(Math.abs(Math.sqrt(varianceOf(logs)) / 0.25 - 1)).toBeLessThan(0.02); // 24,000 draws: 4 s.e. are 1.8 %
		expect(Math.abs(logs.reduce((sum, value) => sum + value, 0) / logs.length)).toBeLessThan(0.0065); // 4 × 0.25 / sqrt(24,000)
	});
});

describe('independentNiches', () => {
	it('gives every species a centre of its own with the asked spread', () => {
		const species = Array.from({ length: RUNS }, (_, index) => `s${index}`);
		const niches = independentNiches(species, 0.8, WIDTHS, randomNumbers(4, 'apart'));
		expect(niches.map((niche) => niche.species)).toEqual(species);
		for (const climate of [0, 1] as const) {
			expect(Math.abs(varianceOf(niches.map(({ centre }) => centre[climate])) / 0.64 - 1)).toBeLessThan(0.09); // as above
		}
	});
});

describe('expectedOverlap', () => {
	// Checked beforehand against 4 million simulated pairs: two climates, theta = 0.25 gives D 0.552786404500 and I 0.8;
	// theta = 1 gives D 0.292893218813 and I 0.5.
	it('agrees with the known means for two climates', () => {
		const quarter = expectedOverlap(10, 0.05, 1);
		expect(quarter.theta).toBeCloseTo(0.25, 12);
		expect(quarter.d).toBeCloseTo(0.5527864045, 10);
		expect(quarter.i).toBeCloseTo(0.8, 12);
		const one = expectedOverlap(20, 0.1, 1);
		expect(one.d).toBeCloseTo(0.292893218813, 10);
		expect(one.i).toBeCloseTo(0.5, 12);
	});
});
