import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bottom, right, type Rect } from './geometry.ts';
import { plateLayout, rowPitch, type LayoutRequest } from './plateLayout.ts';

const request = (count: number, width: number, more: Partial<LayoutRequest> = {}): LayoutRequest => ({
	width,
	names: Array.from({ length: count }, (_, row) => `L. species${row}`),
	direction: 'present-left',
	maxHeight: Infinity,
	smallestName: 7,
	...more
});

describe('rowPitch', () => {
	// look: 24 for 4 to 12 species, about 17 at 26, 8 at 80, 3.4 at 200.
	it('meets the sizes the design names', () => {
		expect([4, 12, 26, 80, 200].map((count) => Math.round(rowPitch(count) * 100) / 100)).toEqual([24, 24, 17, 8, 3.4]);
	});

	it('never grows with the number of species', () => {
		fc.assert(
			fc.property(fc.integer({ min: 2, max: 1999 }), (count) => {
				expect(rowPitch(count + 1)).toBeLessThanOrEqual(rowPitch(count) + 1e-12);
			})
		);
	});
});

describe('plateLayout', () => {
	const boxes = (layout: ReturnType<typeof plateLayout>): Rect[] => [
		layout.wingBox,
		layout.names,
		layout.tree,
		layout.pairs,
		layout.key,
		layout.ends
	];
	const sheets = fc.record({
		count: fc.integer({ min: 4, max: 300 }),
		width: fc.integer({ min: 280, max: 1400 }),
		direction: fc.constantFrom('present-left' as const, 'present-right' as const)
	});

	it('cuts nothing off at the edges of the sheet', () => {
		fc.assert(
			fc.property(sheets, ({ count, width, direction }) => {
				const layout = plateLayout(request(count, width, { direction }));
				for (const box of boxes(layout)) {
					expect(box.x).toBeGreaterThanOrEqual(-1e-9);
					expect(right(box)).toBeLessThanOrEqual(width + 1e-9);
					expect(bottom(box)).toBeLessThanOrEqual(layout.height + 1e-9);
					expect(box.width).toBeGreaterThan(0);
				}
			})
		);
	});

	it('keeps the wing level with the names and outside them', () => {
		fc.assert(
			fc.property(sheets, ({ count, width }) => {
				const layout = plateLayout(request(count, width));
				if (layout.stacked) return;
				expect([layout.wing.top, layout.wing.pitch]).toEqual([layout.tree.y, layout.pitch]);
				expect(right(layout.wingBox)).toBeLessThanOrEqual(layout.names.x);
			})
		);
	});

	it('gives d at least 40 % of the height of a wide plate', () => {
		for (const count of [4, 26, 80, 200]) {
			const layout = plateLayout(request(count, 1180));
			expect(layout.pairs.height / layout.height).toBeGreaterThanOrEqual(0.4 - 1e-9);
		}
	});

	it('is the mirror image when the present is at the right', () => {
		const there = plateLayout(request(26, 900));
		const back = plateLayout(request(26, 900, { direction: 'present-right' }));
		expect(back.tree.x).toBeCloseTo(900 - right(there.tree), 9);
		expect(back.wing.outward).toBe(1);
	});

	it('stacks tree, pairs and wing on a narrow sheet', () => {
		const layout = plateLayout(request(26, 390));
		expect(layout.stacked).toBe(true);
		expect(layout.pairs.y).toBeGreaterThan(bottom(layout.tree));
		expect(layout.wing.top).toBeGreaterThan(bottom(layout.pairs));
	});

	// What is shown is never smaller than asked, and two names of one column never meet: a line of type is 1.1 of its size.
	it('shows no name smaller than the smallest, in one column or in two', () => {
		const more = fc.record({
			maxHeight: fc.constantFrom(Infinity, 1200),
			smallestName: fc.double({ min: 6, max: 11, noNaN: true })
		});
		fc.assert(
			fc.property(sheets, more, ({ count, width, direction }, { maxHeight, smallestName }) => {
				const { nameColumns, nameSize, pitch } = plateLayout(request(count, width, { direction, maxHeight, smallestName }));
				if (nameColumns === 0) return;
				expect(nameSize).toBeGreaterThanOrEqual(smallestName);
				expect(nameSize * 1.1).toBeLessThanOrEqual(nameColumns * pitch * 1.2);
			})
		);
	});

	// By hand: rows of 8 give names of 8.48, under 9.5; two rows give 14, capped at 1.15 × 9.5. Rows of 3.4 give 5.95.
	it('lets names stand in two columns before they give way to spans', () => {
		const columns = (count: number, width = 1180) => plateLayout(request(count, width, { smallestName: 9.5 })).nameColumns;
		expect([26, 80, 200].map((count) => columns(count))).toEqual([1, 2, 0]);
		expect(columns(80, 390)).toBe(0); // a phone has no width for two
		expect(plateLayout(request(80, 1180, { smallestName: 9.5 })).nameSize).toBeCloseTo(10.925, 9);
	});

	it('shrinks its rows until a page holds it', () => {
		const layout = plateLayout(request(200, 845, { maxHeight: 1100 }));
		expect(layout.height).toBeLessThanOrEqual(1100);
		expect(layout.height).toBeGreaterThan(1090);
	});
});
