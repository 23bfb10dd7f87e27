import { describe, expect, it } from 'vitest';
import { ageCurves } from './ageCurves.ts';

const frame = { left: 40, right: 440, top: 10, foot: 210 };
const nodes = [1, 2, 4].map((age) => ({ age, mean: 0.5 }));
const shuffled: [number, number, number] = [0.4, 0.5, 0.7];

describe('ageCurves', () => {
	it('puts the present at the left, overlap 1 at the top, and each class between its ages', () => {
		const { x, y, bands } = ageCurves(
			{ classes: [{ from: 1, to: 2, mean: 0.6, shuffled }], nodes, curves: [], rootAge: 4 },
			frame
		);
		// By hand: 400 units for 4 of age, 200 for 1 of overlap.
		expect([x(0), x(4), y(0), y(1)]).toEqual([40, 440, 210, 10]);
		const [band] = bands;
		expect([band?.x, band?.width]).toEqual([140, 100]);
		for (const [found, expected] of [
			[band?.y, 70],
			[band?.height, 60],
			[band?.middle, 110],
			[band?.mean, 90]
		]) {
			expect(found).toBeCloseTo(expected ?? 0, 9);
		}
	});

	it('gives a class of one age a width, inside the frame', () => {
		const { bands } = ageCurves({ classes: [{ from: 4, to: 4, mean: 0.6, shuffled }], nodes, curves: [], rootAge: 4 }, frame);
		expect([bands[0]?.x, bands[0]?.width]).toEqual([434, 6]);
	});

	it('keeps the names of curves that end close together apart', () => {
		const curve = (name: string, end: number) => ({
			name,
			points: [
				[0, 1],
				[4, end]
			] as [number, number][]
		});
		const { curves } = ageCurves(
			{ classes: [], nodes, curves: [curve('a', 0.3), curve('b', 0.31), curve('c', 0.9)], rootAge: 4 },
			frame
		);
		// By hand: a at 150, b wanted 148 and moved to 136, c at 30.
		for (const [i, place] of [150, 136, 30].entries()) expect(curves[i]?.y).toBeCloseTo(place, 9);
		expect(curves[0]?.path).toBe('M40.0 10.0L440.0 150.0');
	});

	it('leaves the scale of overlap when values do', () => {
		const logit = {
			classes: [{ from: 1, to: 2, mean: -2.2, shuffled: [-3, -2, 1.4] as [number, number, number] }],
			nodes,
			curves: [],
			rootAge: 4
		};
		expect(ageCurves(logit, frame).y.domain()).toEqual([-3, 1.5]);
	});
});
