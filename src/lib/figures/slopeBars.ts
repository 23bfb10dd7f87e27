import { scaleLinear, type ScaleLinear } from 'd3-scale';
import type { PlateData } from '#lib/contracts/analysisResult.ts';

export type SlopeBar = { readonly x: number; readonly width: number; readonly height: number };

export type SlopeBars = {
	readonly x: ScaleLinear<number, number>;
	readonly ticks: readonly { readonly value: number; readonly text: string }[];
	/** from left to right; heights above the foot; empty bins are left out */
	readonly bars: readonly SlopeBar[];
};

/** Room for the text of one tick; drawing units. */
const TICK_ROOM = 76;

/**
 * A histogram of slopes laid out from left to right, on an axis that holds the observed one and no slope at all as well.
 * @param frame - drawing units; the fullest bin is `height` high
 */
export function slopeBars(
	{ edges, counts }: PlateData['slopeHistogram'],
	observed: number,
	frame: { readonly left: number; readonly width: number; readonly height: number }
): SlopeBars {
	const ends = [...edges, observed, 0];
	const { left, width, height } = frame;
	const x = scaleLinear([Math.min(...ends), Math.max(...ends)], [left, left + width]);
	const most = Math.max(1, ...counts);
	const tickCount = Math.max(2, Math.min(7, Math.floor(width / TICK_ROOM)));
	const write = x.tickFormat(tickCount);
	return {
		x,
		ticks: x.ticks(tickCount).map((value) => ({ value, text: write(value) })),
		bars: counts.flatMap((count, bin) => {
			const [from, to] = [x(edges[bin] ?? 0), x(edges[bin + 1] ?? 0)];
			return count > 0 ? [{ x: from, width: to - from, height: (height * count) / most }] : [];
		})
	};
}
