import { describe, expect, it } from 'vitest';
import { markHeight, overlapAxis, overlapBins } from './overlapAxis.ts';

const panel = { x: 0, y: 0, width: 100, height: 126 };

describe('overlapAxis', () => {
	it('runs from 0 to 1 over the whole panel when no value is exactly there', () => {
		const axis = overlapAxis([0.2, 0.9], panel);
		expect([axis.scale(0), axis.scale(1)]).toEqual([126, 0]);
	});

	// By hand: 10 high and 3 apart at either end: 126 − 26 = 100 between.
	it('keeps a shelf beyond each end that some pairs are exactly at', () => {
		const axis = overlapAxis([0, 0, 0.5, 1], panel);
		expect([axis.zeroCount, axis.oneCount]).toEqual([2, 1]);
		expect([axis.scale(0), axis.scale(1)]).toEqual([113, 13]);
		expect([markHeight(axis, 0), markHeight(axis, 1), markHeight(axis, 0.5)]).toEqual([121, 5, 63]);
	});

	it('widens, without shelves, for a measure that leaves 0 to 1', () => {
		const axis = overlapAxis([-0.61, 0, 1], panel);
		expect(axis.low).toBeLessThanOrEqual(-0.61);
		expect(axis.high).toBe(1);
		expect(axis.zeroCount).toBe(0);
		expect(axis.ticks.map(({ text }) => text)).toContain('−0.5');
	});
});

describe('overlapBins', () => {
	it('counts every value once', () => {
		const values = [0, 0, 0.001, 0.049, 0.05, 0.15, 0.3, 0.7, 0.999, 1, Number.NaN];
		const bins = overlapBins(overlapAxis(values, panel), values);
		expect(bins.reduce((sum, { count }) => sum + count, 0)).toBe(10);
	});

	// 0.15 × 20 is 2.9999999999999996 and 0.7 × 20 is 14 in floating point; each must open its own bin.
	it('puts a value on the edge of two bins into the upper one', () => {
		const axis = overlapAxis([0.15, 0.5], panel);
		expect(overlapBins(axis, [0.15])[0]?.share).toBeCloseTo(0.175, 12);
		expect(overlapBins(axis, [0.7])[0]?.share).toBeCloseTo(0.725, 12);
	});
});
