import { describe, expect, it } from 'vitest';
import { mantel } from './mantel.ts';

describe('mantel', () => {
	it('is -1 where overlap falls in a straight line with age', () => {
		const ages = [1, 2, 2, 4, 4, 4];
		const overlaps = ages.map((age) => 1 - age / 8);
		expect(mantel(ages, overlaps).r).toBeCloseTo(-1, 14);
		expect(mantel(ages, overlaps).spearman).toBeCloseTo(-1, 14);
	});

	// By hand: 1·0.5 + 2·0.25 + 3·0.125.
	it('sums overlap times age', () => {
		expect(mantel([1, 2, 3], [0.5, 0.25, 0.125]).z).toBe(1.375);
	});

	it('refuses ages or overlaps without variation', () => {
		expect(() => mantel([2, 2, 2], [0.1, 0.2, 0.3])).toThrow('Expected ages that differ; all 3 are 2.');
		expect(() => mantel([1, 2, 3], [0.2, 0.2, 0.2])).toThrow('Expected overlaps that differ; all 3 are 0.2.');
	});
});
