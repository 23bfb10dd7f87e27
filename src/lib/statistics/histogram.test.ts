import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { histogram } from './histogram.ts';

describe('histogram', () => {
	// By hand: width 1; 1 falls into the second bin, 4 into the last.
	it('puts a value on an edge into the upper bin, the largest into the last', () => {
		expect(histogram(Float64Array.of(0, 1, 1.5, 4), 4)).toEqual({ edges: [0, 1, 2, 3, 4], counts: [1, 2, 0, 1] });
	});

	it('counts every value once', () => {
		const values = fc.float64Array({ noNaN: true, minLength: 1, min: -1e6, max: 1e6 });
		fc.assert(
			fc.property(values, fc.integer({ min: 1, max: 50 }), (drawn, bins) => {
				const { edges, counts } = histogram(drawn, bins);
				expect(counts.reduce((sum, count) => sum + count, 0)).toBe(drawn.length);
				expect(edges.length).toBe(bins + 1);
			})
		);
	});

	it('gives equal values a middle bin', () => {
		expect(histogram(Float64Array.of(2, 2), 3).counts).toEqual([0, 2, 0]);
	});

	it('refuses nothing, NaN and no bins', () => {
		expect(() => histogram(new Float64Array(0), 3)).toThrow('Expected at least 1 value');
		expect(() => histogram(Float64Array.of(Number.NaN), 3)).toThrow('Expected value 1 to be a finite number; got NaN.');
		expect(() => histogram(Float64Array.of(1), 0)).toThrow('at least 1 bin');
	});
});
