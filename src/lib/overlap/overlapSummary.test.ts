import { describe, expect, it } from 'vitest';
import { overlapSummary } from './overlapSummary.ts';

describe('overlapSummary', () => {
	// By hand: pairs 0.2, 0.4, 0.9 and one of six missing three times.
	it('counts each pair once and leaves missing pairs aside', () => {
		const values = Float64Array.of(1, 0.2, 0.4, NaN, 0.2, 1, 0.9, NaN, 0.4, 0.9, 1, NaN, NaN, NaN, NaN, 1);
		const summary = overlapSummary({ species: ['A', 'B', 'C', 'D'], values });
		expect(summary).toEqual({ species: 4, pairs: 3, missing: 3, min: 0.2, max: 0.9, mean: 0.5, median: 0.4 });
	});

	it('refuses a matrix without a value', () => {
		expect(() => overlapSummary({ species: ['A', 'B'], values: Float64Array.of(1, NaN, NaN, 1) })).toThrow(
			'every pair is missing'
		);
	});
});
