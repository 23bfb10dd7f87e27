import { bottom, type Rect } from './geometry.ts';
import { grouped } from './numberText.ts';
import type { OverlapAxis } from './overlapAxis.ts';
import { TYPE } from './plateLayout.ts';
import { grownTo } from './pourIn.ts';
import type { Poured } from './pour.svelte.ts';
import type { PlateInput } from './plateModel.ts';
import { endAtRoot, endBars, endsScale, filledEdges, type EndBar, type EndsScale } from './shuffledEnds.ts';

/** What stands in e, in heights of the sheet; horizontal places are distances from the root edge. */
export type EndsScene = {
	/** where the bars begin, beyond the columns that stand at the root */
	readonly inset: number;
	readonly width: number;
	readonly bars: readonly EndBar[];
	/** of the fullest bar */
	readonly longest: number;
	/** ends of single shuffled lines, drawn where all relabellings are few enough to be counted out */
	readonly ticks: readonly number[];
	/** end of the observed line on the axis of d and in e */
	readonly observed: { readonly onAxis: number; readonly here: number };
	/** hairlines from the axis to the magnified panel: [height on the axis, height in e] */
	readonly leaders: readonly (readonly [number, number])[];
	/** how many times e is magnified, or null */
	readonly times: number | null;
	readonly words: readonly string[];
	readonly wordsY: number;
	readonly observedY: number;
	readonly place: (slope: number) => number;
};

export type EndsFrame = {
	readonly panel: Rect;
	readonly axis: OverlapAxis;
	readonly rootAge: number;
	readonly stacked: boolean;
	readonly inset: number;
};

/** All relabellings up to this many are counted out in words; 8! */
const COUNTED_OUT = 40_320;
const LINE = TYPE * 1.15;

export function endsScene(input: PlateInput, { panel, axis, rootAge, stacked, inset }: EndsFrame): EndsScene {
	const { plate, permutation, regression } = input;
	const toEnd = (slope: number) => endAtRoot(slope, plate, rootAge);
	const countedOut = permutation?.exact === true && permutation.count <= COUNTED_OUT;
	const shuffled = countedOut ? plate.fanSlopes : filledEdges(plate.slopeHistogram);
	const observedEnd = toEnd(regression.slope);
	const scale = endsScale([...shuffled.map(toEnd), observedEnd], axis);
	const place = (slope: number) => scale.place(toEnd(slope));
	const width = panel.width - inset;
	const longest = width * (stacked ? 0.9 : 0.62);
	const bars = countedOut ? [] : endBars(plate.slopeHistogram, place, longest);
	const ticks = countedOut ? [...new Set(plate.fanSlopes.map(place))] : [];
	const here = scale.place(observedEnd);
	const words = wordsOf(countedOut ? permutation.count : null, shuffled.length > 0, scale, stacked);
	const marks = [...bars.flatMap(({ y, height }) => [y, y + height]), ...ticks];
	return {
		...{ inset, width, bars, longest, ticks, place, words },
		observed: { onAxis: axis.scale(Math.min(axis.high, Math.max(axis.low, observedEnd))), here },
		leaders: leadersOf(scale, axis),
		times: scale.magnified && Math.round(scale.magnified.times),
		...wordPlaces(here, marks, { panel, lines: words.length })
	};
}

function leadersOf({ magnified, place }: EndsScale, axis: OverlapAxis): [number, number][] {
	if (!magnified) return [];
	return [magnified.low, magnified.high].map((end) => [axis.scale(end), place(end)]);
}

function wordsOf(exactCount: number | null, any: boolean, { magnified }: EndsScale, stacked: boolean): string[] {
	if (exactCount !== null) return stacked ? [grouped(exactCount), 'exact'] : [grouped(exactCount), 'relabellings,', 'exact'];
	if (!any) return [];
	return magnified ? ['shuffled', `(× ${Math.round(magnified.times)})`] : ['shuffled'];
}

/** “Shuffled” on the far side of the observed end, so that the two words never meet, and both inside the panel. */
function wordPlaces(observed: number, marks: readonly number[], { panel, lines }: { panel: Rect; lines: number }) {
	const top = Math.min(observed, ...marks);
	const floor = Math.max(observed, ...marks);
	const middle = marks.length === 0 ? observed - 1 : (Math.min(...marks) + Math.max(...marks)) / 2;
	const room = (lines - 1) * LINE;
	if (observed >= middle) {
		return { wordsY: Math.max(panel.y + TYPE, top - 7 - room), observedY: Math.min(bottom(panel), floor + TYPE * 1.2) };
	}
	return { wordsY: Math.min(bottom(panel) - room, floor + TYPE * 1.3), observedY: Math.max(panel.y + TYPE, top - 6) };
}

/** The bars of e in the middle of being poured in. */
export function pouredBars({ plate }: PlateInput, ends: EndsScene, { share, counts }: Poured): readonly EndBar[] {
	return ends.bars.length === 0
		? []
		: endBars({ ...plate.slopeHistogram, counts: [...counts] }, ends.place, ends.longest * grownTo(share));
}
