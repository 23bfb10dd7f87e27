import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	cladeTriangle,
	nodeBlocks,
	wingBlock,
	wingCellAt,
	wingInk,
	wingOutline,
	wingPoint,
	type WingPlace
} from './wingGeometry.ts';

const left: WingPlace = { count: 4, top: 100, pitch: 20, across: 20, edge: 300, outward: -1 };
const right: WingPlace = { ...left, edge: 50, outward: 1, across: 10 };

describe('wingPoint', () => {
	// By hand: rows 0 and 1 have their middles at 110 and 130; half a row of 20 out.
	it('puts a cell at the mean height of its rows, half their distance out', () => {
		expect(wingPoint(left, 0, 1)).toEqual([290, 120]);
		expect(wingPoint(left, 0, 3)).toEqual([270, 140]);
		expect(wingPoint(right, 0, 3)).toEqual([65, 140]);
	});
});

describe('wingCellAt', () => {
	it('finds the cell whose middle is asked, whichever way the wing points', () => {
		const rows = fc.tuple(fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 3 })).filter(([i, j]) => i < j);
		fc.assert(
			fc.property(rows, fc.constantFrom(left, right), ([i, j], wing) => {
				expect(wingCellAt(wing, wingPoint(wing, i, j))).toEqual([i, j]);
			})
		);
	});

	it('finds the same cell anywhere inside its diamond', () => {
		const inside = fc.tuple(fc.double({ min: -0.49, max: 0.49, noNaN: true }), fc.double({ min: -0.49, max: 0.49, noNaN: true }));
		fc.assert(
			fc.property(inside, ([a, b]) => {
				expect(wingCellAt(left, wingPoint(left, 1 + a, 3 + b))).toEqual([1, 3]);
			})
		);
	});

	// By hand: on the names' side, above the first row, and beyond the last pairing.
	it('finds nothing outside the wing', () => {
		expect(wingCellAt(left, [305, 140])).toBeNull();
		expect(wingCellAt(left, [290, 102])).toBeNull();
		expect(wingCellAt(left, [255, 140])).toBeNull();
	});
});

describe('wingBlock', () => {
	// By hand: rows 0–1 against row 2: edges at row places −0.5, 1.5 and 1.5, 2.5.
	it('is the rectangle across two daughters', () => {
		expect(wingBlock(left, { from: 0, to: 2 }, { from: 2, to: 3 })).toEqual([
			[280, 120],
			[270, 130],
			[290, 150],
			[300, 140]
		]);
	});

	// Conservation: three daughters make three pairs of daughters.
	it('gives a polytomy one rectangle for each pair of daughters', () => {
		const sides = [
			{ from: 0, to: 1 },
			{ from: 1, to: 3 },
			{ from: 3, to: 4 }
		];
		expect(nodeBlocks(left, sides)).toHaveLength(3);
	});
});

describe('cladeTriangle', () => {
	// By hand: a clade of all four rows reaches two rows out at the middle of the names.
	it('stands on the names and ends at the cell of its outer rows', () => {
		expect(cladeTriangle(left, { from: 0, to: 4 })).toEqual([
			[300, 100],
			[260, 140],
			[300, 180]
		]);
	});
});

describe('wingInk', () => {
	it('draws every pair once, in the class of its overlap', () => {
		const ink = wingInk(left, (i) => (i === 0 ? 0 : 1));
		const cells = ink.classes.map(({ share, path }) => [share, path.split('M').length - 1]);
		// By hand: three pairs hold row 0, three do not.
		expect(cells).toEqual([
			[0, 3],
			[1, 3]
		]);
	});

	it('hatches a missing pair instead of colouring it', () => {
		const ink = wingInk(left, (i, j) => (i === 1 && j === 2 ? Number.NaN : 0.5));
		expect(ink.classes.reduce((cells, { path }) => cells + path.split('M').length - 1, 0)).toBe(5);
		expect(ink.missing.split('M')).toHaveLength(4); // three hairlines
	});

	// By hand: rows 6 apart; cell (1, 2) has its middle at row place 2, 112, and one hairline of 0.92 × 2 × 3.12 across it.
	it('hatches a small cell by its middle hairline alone', () => {
		const small = { ...left, pitch: 6, across: 6 };
		expect(wingInk(small, (i, j) => (i === 1 && j === 2 ? Number.NaN : 0.5)).missing).toBe('M294.13 112h5.74');
	});
});

describe('wingOutline', () => {
	it('closes for the smallest wing, of two species', () => {
		expect(wingOutline({ ...left, count: 2 })).toMatch(/^M.*Z$/);
	});
});
