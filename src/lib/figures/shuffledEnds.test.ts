import { describe, expect, it } from 'vitest';
import { overlapAxis } from './overlapAxis.ts';
import { pouredBars } from './endsScene.ts';
import { plateScene } from './plateScene.ts';
import { endAtRoot, endBars, endsScale, filledEdges } from './shuffledEnds.ts';
import { microPlate } from './microPlate.fixture.ts';

const axis = overlapAxis([0.5], { x: 0, y: 0, width: 50, height: 100 });

describe('endAtRoot', () => {
	// By hand from the micro-example: 238/265 − 4 × 31/265 = 114/265.
	it('is the observed line at the root for the observed slope', () => {
		expect(endAtRoot(-31 / 265, microPlate().plate, 4)).toBeCloseTo(114 / 265, 12);
	});
});

describe('endsScale', () => {
	it('is the axis itself when the ends fill 12 % of it or more', () => {
		const scale = endsScale([0.3, 0.6], axis);
		expect(scale.magnified).toBeNull();
		expect(scale.place(0.3)).toBeCloseTo(70, 10);
	});

	// By hand: a span of 0.1 drawn 42 high is magnified 4.2 times about 0.45.
	it('magnifies narrow ends about their middle', () => {
		const scale = endsScale([0.4, 0.5], axis);
		expect(scale.magnified?.times).toBeCloseTo(4.2, 10);
		expect(scale.place(0.45)).toBeCloseTo(55, 10);
		expect(scale.place(0.4) - scale.place(0.5)).toBeCloseTo(42, 10);
	});

	it('keeps magnified ends inside the panel', () => {
		const scale = endsScale([0.97, 0.99], axis);
		expect(scale.place(0.99)).toBeGreaterThanOrEqual(-1e-9);
	});
});

describe('endBars', () => {
	it('draws the fullest bin at full length and leaves out empty ones', () => {
		const bars = endBars({ edges: [0, 1, 2, 3], counts: [2, 0, 4] }, (slope) => 10 * slope, 60);
		expect(bars).toEqual([
			{ y: 0, height: 10, length: 30 },
			{ y: 20, height: 10, length: 60 }
		]);
	});
});

describe('filledEdges', () => {
	it('spans the bins that hold something', () => {
		expect(filledEdges({ edges: [0, 1, 2, 3], counts: [0, 3, 0] })).toEqual([1, 2]);
		expect(filledEdges({ edges: [], counts: [] })).toEqual([]);
	});
});

describe('pouredBars', () => {
	const input = { ...microPlate(), permutation: { count: 24, exact: false } };
	const request = { width: 900, maxHeight: Infinity, smallestName: 7, abbreviateGenus: true };
	const { ends } = plateScene(input, { ...request, direction: 'present-left', average: 'nested' });

	// By hand: after a sixteenth of the shuffles the fullest bar is half as long as in the end; the bin that holds none has no bar.
	it('stands lower while few have come in', () => {
		const bars = pouredBars(input, ends, { share: 1 / 16, counts: [0, 1, 2, 1] });
		expect(bars).toHaveLength(3);
		expect(Math.max(...bars.map(({ length }) => length))).toBeCloseTo(ends.longest / 2, 9);
	});

	it('ends as the stored histogram is drawn', () => {
		expect(pouredBars(input, ends, { share: 1, counts: input.plate.slopeHistogram.counts })).toEqual(ends.bars);
	});
});
