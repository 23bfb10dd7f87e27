import type { PlateData } from '#lib/contracts/analysisResult.ts';
import { clamp } from './geometry.ts';
import type { OverlapAxis } from './overlapAxis.ts';

/** Every shuffled line passes through (mean age, mean overlap): where it ends at the root is its slope. */
export function endAtRoot(slope: number, pivot: Pick<PlateData, 'meanAge' | 'meanOverlap'>, rootAge: number): number {
	return pivot.meanOverlap + slope * (rootAge - pivot.meanAge);
}

/** Ends that fill less of the axis than this are magnified. */
export const NARROW_SHARE = 0.12;
const MAGNIFIED_SHARE = 0.42;

export type EndsScale = {
	readonly place: (overlap: number) => number;
	/** null when the panel has the scale of the axis itself */
	readonly magnified: { readonly times: number; readonly low: number; readonly high: number } | null;
};

/**
 * Vertical places in e. The overlap axis itself, unless all ends, the observed one among them, fill under 12 % of it;
 * then the same middle, magnified.
 * @param ends - overlaps at the root; at least one
 */
export function endsScale(ends: readonly number[], axis: OverlapAxis): EndsScale {
	const low = Math.min(...ends);
	const high = Math.max(...ends);
	const span = high - low;
	if (!(span > 0) || span >= NARROW_SHARE * (axis.high - axis.low))
		return { place: (overlap) => axis.scale(clamp(overlap, axis.low, axis.high)), magnified: null };
	const height = axis.inner.height * MAGNIFIED_SHARE;
	const { y, height: innerHeight } = axis.inner;
	const middle = clamp(axis.scale((low + high) / 2), y + height / 2, y + innerHeight - height / 2);
	const perUnit = height / span;
	const place = (overlap: number) => middle - (overlap - (low + high) / 2) * perUnit;
	return { place, magnified: { times: (perUnit * (axis.high - axis.low)) / innerHeight, low, high } };
}

export type EndBar = { readonly y: number; readonly height: number; readonly length: number };

/** Bars of the histogram of ends, the longest as long as `longest`; empty bins are left out. */
export function endBars(histogram: PlateData['slopeHistogram'], toPlace: (slope: number) => number, longest: number): EndBar[] {
	const most = Math.max(1, ...histogram.counts);
	return histogram.counts.flatMap((count, bin) => {
		const a = toPlace(histogram.edges[bin] ?? 0);
		const b = toPlace(histogram.edges[bin + 1] ?? 0);
		return count > 0 ? [{ y: Math.min(a, b), height: Math.abs(a - b), length: (longest * count) / most }] : [];
	});
}

/** Slopes at the two outer edges of the bins that hold something; empty for an empty histogram. */
export function filledEdges({ edges, counts }: PlateData['slopeHistogram']): number[] {
	const first = counts.findIndex((count) => count > 0);
	const last = counts.findLastIndex((count) => count > 0);
	return first < 0 ? [] : [edges[first] ?? 0, edges[last + 1] ?? 0];
}
