import { scaleLinear, type ScaleLinear } from 'd3-scale';
import { bottom, type Rect } from './geometry.ts';
import { signed } from './numberText.ts';

/** Values that are exactly at an end of the axis get a shelf of this height beyond it; drawing units. */
export const SHELF_HEIGHT = 10;
const SHELF_GAP = 3;

export type OverlapAxis = {
	readonly scale: ScaleLinear<number, number>;
	readonly low: number;
	readonly high: number;
	/** the part of the panel between the shelves */
	readonly inner: Rect;
	/** how many values are exactly 0 and exactly 1; no shelf where the count is 0 */
	readonly zeroCount: number;
	readonly oneCount: number;
	readonly ticks: readonly { readonly value: number; readonly text: string }[];
};

/** The vertical axis that c, d and e share: 0 to 1, or wider when a measure leaves that range. */
export function overlapAxis(values: ArrayLike<number>, panel: Rect): OverlapAxis {
	let [least, most, zeroCount, oneCount] = [Infinity, -Infinity, 0, 0];
	for (let k = 0; k < values.length; k++) {
		const value = values[k] ?? Number.NaN;
		if (Number.isNaN(value)) continue;
		least = Math.min(least, value);
		most = Math.max(most, value);
		if (value === 0) zeroCount += 1;
		if (value === 1) oneCount += 1;
	}
	const within = !(least < 0 || most > 1);
	const [low = 0, high = 1] = within ? [0, 1] : scaleLinear([least, most], [0, 1]).nice(5).domain();
	if (!within) [zeroCount, oneCount] = [0, 0];
	const top = panel.y + (oneCount > 0 ? SHELF_HEIGHT + SHELF_GAP : 0);
	const floor = bottom(panel) - (zeroCount > 0 ? SHELF_HEIGHT + SHELF_GAP : 0);
	const scale = scaleLinear([low, high], [floor, top]);
	const steps = within ? [0, 0.25, 0.5, 0.75, 1] : scale.ticks(5);
	const digits = within ? 2 : Math.max(0, Math.ceil(-Math.log10(Math.abs((steps[1] ?? 1) - (steps[0] ?? 0)) + 1e-12)));
	const ticks = steps.map((value) => ({ value, text: signed(value, digits) }));
	return { scale, low, high, inner: { ...panel, y: top, height: floor - top }, zeroCount, oneCount, ticks };
}

/** Height of a mark: exact ends lie on their shelf. */
export function markHeight(axis: OverlapAxis, value: number): number {
	if (value === 0 && axis.zeroCount > 0) return bottom(axis.inner) + SHELF_GAP + SHELF_HEIGHT / 2;
	if (value === 1 && axis.oneCount > 0) return axis.inner.y - SHELF_GAP - SHELF_HEIGHT / 2;
	return axis.scale(value);
}

/** Place of an overlap on the colour ramp, 0 to 1. */
export function rampShare(axis: OverlapAxis, value: number): number {
	return (value - axis.low) / (axis.high - axis.low);
}

export const BIN_COUNT = 20;

export type OverlapBin = {
	readonly y: number;
	readonly height: number;
	readonly count: number;
	/** place of the bin's middle on the ramp */
	readonly share: number;
};

/** Counts of values in 20 equal bins and on the two shelves; empty bins are left out. A bin holds its lower bound. */
export function overlapBins(axis: OverlapAxis, values: Iterable<number>): OverlapBin[] {
	const counts = new Array<number>(BIN_COUNT + 2).fill(0);
	for (const value of values) {
		if (Number.isNaN(value)) continue;
		const place = binOf(axis, value);
		counts[place] = (counts[place] ?? 0) + 1;
	}
	const step = axis.inner.height / BIN_COUNT;
	const bins = counts.map((count, index): OverlapBin => {
		if (index === BIN_COUNT) return { y: bottom(axis.inner) + SHELF_GAP, height: SHELF_HEIGHT, count, share: 0 };
		if (index > BIN_COUNT) return { y: axis.inner.y - SHELF_GAP - SHELF_HEIGHT, height: SHELF_HEIGHT, count, share: 1 };
		return { y: bottom(axis.inner) - (index + 1) * step, height: step, count, share: (index + 0.5) / BIN_COUNT };
	});
	return bins.filter(({ count }) => count > 0);
}

function binOf(axis: OverlapAxis, value: number): number {
	if (value === 0 && axis.zeroCount > 0) return BIN_COUNT;
	if (value === 1 && axis.oneCount > 0) return BIN_COUNT + 1;
	// A value such as 0.15 must fall into the bin that begins there although 0.15 × 20 is 2.9999999999999996.
	const place = Math.floor(rampShare(axis, value) * BIN_COUNT + 1e-9);
	return Math.min(BIN_COUNT - 1, Math.max(0, place));
}
