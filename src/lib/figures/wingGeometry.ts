import { pathThrough, type Point } from './geometry.ts';
import type { RowRange } from './plateModel.ts';

/**
 * Where a wing stands. Rows run down from `top`, `pitch` apart. Cell (i, j) is a diamond whose centre lies at the mean
 * height of its rows, |i − j| / 2 steps of `across` away from `edge`; `outward` is -1 when the wing points left, +1 when
 * right. `across` equals `pitch`, a turn by 45°, unless the sheet is too narrow: the rows must still meet the names.
 */
export type WingPlace = {
	readonly count: number;
	readonly top: number;
	readonly pitch: number;
	readonly across: number;
	readonly edge: number;
	readonly outward: -1 | 1;
};

/** The point that belongs to real-valued row places (i, j); a row's own middle is a whole number. */
export function wingPoint(wing: WingPlace, i: number, j: number): Point {
	const out = (Math.abs(i - j) / 2) * wing.across;
	return [wing.edge + wing.outward * out, wing.top + ((i + j + 1) / 2) * wing.pitch];
}

/** The cell under a point, upper row first, or null outside the wing: `wingPoint` solved for i and j. */
export function wingCellAt(wing: WingPlace, [x, y]: Point): readonly [number, number] | null {
	const middle = (y - wing.top) / wing.pitch - 0.5;
	const out = (wing.outward * (x - wing.edge)) / wing.across;
	const i = Math.round(middle - out);
	const j = Math.round(middle + out);
	return out > 0 && i >= 0 && j < wing.count && i < j ? [i, j] : null;
}

/** The cells whose rows are in `upper` and in `lower`: a rectangle standing on its corner. `upper` lies above `lower`. */
export function wingBlock(wing: WingPlace, upper: RowRange, lower: RowRange): readonly Point[] {
	const [i0, i1] = [upper.from - 0.5, upper.to - 0.5];
	const [j0, j1] = [lower.from - 0.5, lower.to - 0.5];
	return [wingPoint(wing, i0, j0), wingPoint(wing, i0, j1), wingPoint(wing, i1, j1), wingPoint(wing, i1, j0)];
}

/** The blocks of a node: one rectangle for each pair of daughters. */
export function nodeBlocks(wing: WingPlace, sides: readonly RowRange[]): (readonly Point[])[] {
	return sides.flatMap((upper, index) => sides.slice(index + 1).map((lower) => wingBlock(wing, upper, lower)));
}

/** All pairs inside a clade: a triangle on the names. */
export function cladeTriangle(wing: WingPlace, { from, to }: RowRange): readonly Point[] {
	return [wingPoint(wing, from - 0.5, from - 0.5), wingPoint(wing, from - 0.5, to - 0.5), wingPoint(wing, to - 0.5, to - 0.5)];
}

/** The hairline round all cells, along their teeth on the side of the names. */
export function wingOutline(wing: WingPlace): string {
	const last = wing.count - 0.5;
	const points: Point[] = [wingPoint(wing, -0.5, 0.5), wingPoint(wing, -0.5, last), wingPoint(wing, last - 1, last)];
	for (let row = wing.count - 1; row > 0; row--) {
		points.push(wingPoint(wing, row - 0.5, row - 0.5));
		if (row > 1) points.push(wingPoint(wing, row - 1.5, row - 0.5));
	}
	return pathThrough(points, true);
}

/** Half the diagonal of a drawn cell: a hair of paper between large cells, a hair of overlap between small ones. */
export function cellReach(pitch: number): number {
	if (pitch >= 7) return pitch / 2 - Math.min(0.6, pitch * 0.03);
	return pitch / 2 + 0.12;
}

/** Compact path of one cell. */
export function cellPath(wing: WingPlace, i: number, j: number): string {
	const [x, y] = wingPoint(wing, i, j);
	const h = round(cellReach(wing.across));
	const v = round(cellReach(wing.pitch));
	return `M${round(x - h)} ${round(y)}l${h}-${v} ${h} ${v}-${h} ${v}z`;
}

function round(value: number): number {
	return Math.round(value * 100) / 100;
}

/** Rows closer than this have room for one hairline in a cell; more would fill it with grey. */
const THREE_HAIRLINES_FROM = 7;

/** Hatching of a missing cell: three hairlines at half, none and half of the way up, or the middle one alone. */
export function hatchPath(wing: WingPlace, i: number, j: number): string {
	const [x, y] = wingPoint(wing, i, j);
	const reach = cellReach(wing.pitch);
	const wide = cellReach(wing.across);
	return (wing.pitch < THREE_HAIRLINES_FROM ? [0] : [-0.5, 0, 0.5])
		.map((share) => {
			const half = wide * (1 - Math.abs(share)) * 0.92;
			return `M${round(x - half)} ${round(y + share * reach)}h${round(2 * half)}`;
		})
		.join('');
}

export type WingInk = {
	/** one path per colour class, palest first; `share` is the middle of the class on the ramp */
	readonly classes: readonly { readonly share: number; readonly path: string }[];
	/** one path for the hatching of all missing cells, '' when none is missing */
	readonly missing: string;
};

/** Classes of the ramp: fine enough that no step is seen, few enough that a wing is a handful of paths. */
export const RAMP_CLASSES = 50;

/**
 * All cells as a few paths, one per colour class: thousands of single elements would be slow on screen and large in print.
 * @param shareOf - place of the pair (i, j), i above j, on the ramp; NaN when the pair is missing
 * @param drawn - the cells to draw; all of them unless told otherwise
 */
export function wingInk(
	wing: WingPlace,
	shareOf: (i: number, j: number) => number,
	drawn?: (i: number, j: number) => boolean
): WingInk {
	const paths = Array.from({ length: RAMP_CLASSES }, () => [] as string[]);
	const missing: string[] = [];
	for (let j = 1; j < wing.count; j++) {
		for (let i = 0; i < j; i++) {
			if (drawn && !drawn(i, j)) continue;
			const share = shareOf(i, j);
			if (Number.isNaN(share)) missing.push(hatchPath(wing, i, j));
			else paths[rampClass(share)]?.push(cellPath(wing, i, j));
		}
	}
	const classes = paths.map((cells, index) => ({ share: classShare(index), path: cells.join('') }));
	return { classes: classes.filter(({ path }) => path !== ''), missing: missing.join('') };
}

export function rampClass(share: number): number {
	return Math.min(RAMP_CLASSES - 1, Math.max(0, Math.floor(share * RAMP_CLASSES)));
}

/** The ends of the ramp belong to the first and last class whole, so that 0 and 1 have the ends' own colours. */
export function classShare(index: number): number {
	return index / (RAMP_CLASSES - 1);
}
