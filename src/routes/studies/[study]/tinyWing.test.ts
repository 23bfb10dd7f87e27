import { describe, expect, it } from 'vitest';
import { TINY_ROWS, tinyWing, tinyWingPaths } from './tinyWing.ts';

describe('tinyWing', () => {
	// By hand: file order c, a, b with c–a .1, c–b .2, a–b .9; in tree order a, b, c the triangle is ab, ac, bc.
	it('puts the matrix into tree order', () => {
		const wing = tinyWing({ species: ['c', 'a', 'b'], lower: Float64Array.of(0.1, 0.2, 0.9) }, ['a', 'b', 'c']);
		expect(wing).toEqual({ rows: 3, lower: [0.9, 0.1, 0.2] });
	});

	it('keeps a missing pair missing and a species outside the tree last', () => {
		const wing = tinyWing({ species: ['x', 'b', 'a'], lower: Float64Array.of(Number.NaN, 0.4, 0.5) }, ['a', 'b']);
		expect(wing.lower).toEqual([0.5, 0.4, null]);
	});

	// By property: the mean of equal values is that value, however many are averaged.
	it('averages neighbours of a large matrix', () => {
		const n = 200;
		const species = Array.from({ length: n }, (_, i) => `s${i}`);
		const wing = tinyWing({ species, lower: new Float64Array((n * (n - 1)) / 2).fill(0.25) }, species);
		expect(wing.rows).toBe(TINY_ROWS);
		expect(new Set(wing.lower)).toEqual(new Set([0.25]));
	});
});

describe('tinyWingPaths', () => {
	// By hand: .9 falls into the sixth step of six, .1 into the first, .2 into the second.
	it('sorts cells into the steps of the ramp', () => {
		const { ramp, missing } = tinyWingPaths({ rows: 3, lower: [0.9, 0.1, 0.2] }, 2);
		expect(ramp.map((path) => path.split('M').length - 1)).toEqual([1, 1, 0, 0, 0, 1]);
		expect(missing).toBe('');
	});
});
