import { describe, expect, it } from 'vitest';
import { overlapFigures } from './overlapFigures.ts';

describe('overlapFigures', () => {
	// By hand: 0.2, 0.4, 0.9 and three pairs missing of the six that four species have.
	it('counts missing pairs apart and describes the others', () => {
		const figures = overlapFigures(4, Float64Array.of(0.9, Number.NaN, 0.2, Number.NaN, 0.4, Number.NaN));
		expect(figures).toMatchObject({ species: 4, pairs: 3, missing: 3, spread: { min: 0.2, median: 0.4, max: 0.9 } });
		expect(figures.spread?.mean).toBeCloseTo(0.5, 12);
	});

	// By hand: the middle of 0.2 and 0.4.
	it('takes the middle of two for an even number of pairs', () => {
		expect(overlapFigures(3, Float64Array.of(0.4, 0.2, Number.NaN)).spread?.median).toBeCloseTo(0.3, 12);
	});

	it('gives no figures when every pair is missing', () => {
		expect(overlapFigures(2, Float64Array.of(Number.NaN)).spread).toBeNull();
	});

	it('leaves the values it was given as they are', () => {
		const lower = Float64Array.of(0.9, 0.1, 0.5);
		overlapFigures(3, lower);
		expect([...lower]).toEqual([0.9, 0.1, 0.5]);
	});
});
