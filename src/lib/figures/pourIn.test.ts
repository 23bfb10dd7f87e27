import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { grownTo, pourer } from './pourIn.ts';

const histograms = fc.array(fc.integer({ min: 0, max: 400 }), { minLength: 1, maxLength: 60 });
const sum = (counts: readonly number[]) => counts.reduce((total, count) => total + count, 0);

describe('pourer', () => {
	it('ends in exactly the counts that were stored', () => {
		fc.assert(
			fc.property(histograms, fc.integer(), (counts, seed) => {
				const pour = pourer(counts, seed);
				pour(0.3);
				expect(pour(1)).toEqual(counts);
			})
		);
	});

	// By property: shuffles are only added, never more of them in a bin than were stored, and as many as were asked for.
	it('only ever adds, as many as the share says', () => {
		fc.assert(
			fc.property(histograms, fc.double({ min: 0, max: 0.99, noNaN: true }), (counts, share) => {
				const pour = pourer(counts, 7);
				const before = pour(share / 2);
				const after = pour(share);
				expect(sum(after)).toBe(Math.floor(share * sum(counts)));
				for (const [bin, count] of after.entries()) {
					expect(count).toBeGreaterThanOrEqual(before[bin] ?? Number.NaN);
					expect(count).toBeLessThanOrEqual(counts[bin] ?? Number.NaN);
				}
			})
		);
	});

	// By hand: 1,000,000 are five to a drop, so half of them are 100,000 drops or 500,000 shuffles.
	it('lets several fall at a time where they are very many', () => {
		const half = pourer([400_000, 600_000], 1)(0.5);
		expect(sum(half)).toBe(500_000);
		expect((half[0] ?? 0) / 500_000).toBeCloseTo(0.4, 1);
	});

	it('pours alike from the same seed', () => {
		expect(pourer([5, 9, 2], 3)(0.5)).toEqual(pourer([5, 9, 2], 3)(0.5));
	});
});

describe('grownTo', () => {
	// By hand: a sixteenth of the shuffles stand half as high.
	it('lets the first few be seen and ends at full length', () => {
		expect([grownTo(0), grownTo(1 / 16), grownTo(1)]).toEqual([0, 0.5, 1]);
	});
});
