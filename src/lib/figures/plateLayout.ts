import { clamp, mirrored, right, type Rect } from './geometry.ts';
import { textWidth } from './textWidth.ts';
import type { WingPlace } from './wingGeometry.ts';

export type AgeDirection = 'present-left' | 'present-right';

export type LayoutRequest = {
	/** sheet width in drawing units: CSS pixels on screen; in print 12 units are one line of type */
	readonly width: number;
	/** names as printed, top to bottom */
	readonly names: readonly string[];
	readonly direction: AgeDirection;
	/** no sheet is higher than this; Infinity on screen */
	readonly maxHeight: number;
	/** names that would be smaller than this stand in two columns by turns, and where that does not do, give way to spans */
	readonly smallestName: number;
};

export type PlateLayout = {
	readonly width: number;
	readonly height: number;
	/** the phone's and the single column's arrangement: tree over d, wing below */
	readonly stacked: boolean;
	readonly direction: AgeDirection;
	readonly pitch: number;
	readonly nameSize: number;
	/** one name a row; two columns by turns, so that a name has the height of two rows; or none but those of spans */
	readonly nameColumns: 0 | 1 | 2;
	readonly names: Rect;
	/** names again beside a wing that stands below; null in the wide arrangement */
	readonly wingNames: Rect | null;
	readonly tree: Rect;
	readonly wing: WingPlace;
	readonly wingBox: Rect;
	readonly ageAxis: Rect;
	readonly pairs: Rect;
	readonly key: Rect;
	readonly ends: Rect;
};

/** One line of type; every other measure is told in it or was tried at it. */
export const TYPE = 12;
/** Narrower sheets have tree over d and the wing below. */
export const STACKED_BELOW = 46 * TYPE;
const EDGE = 2;
const HEAD = 26;
const AXIS = 54;
const FOOT = 24;
const D_SHARE = 0.4;
const D_LEAST = 230;
const AXIS_LABELS = 42;

const ROWS: readonly (readonly [count: number, pitch: number])[] = [
	[12, 24],
	[26, 17],
	[80, 8],
	[200, 3.4]
];

/** Row height for a number of species: 24 up to 12, then along 17 at 26, 8 at 80, 3.4 at 200; beyond that the same height in all. */
export function rowPitch(count: number): number {
	const [smallest] = ROWS;
	if (smallest && count <= smallest[0]) return smallest[1];
	for (let k = 1; k < ROWS.length; k++) {
		const [n0, p0] = ROWS[k - 1] ?? [1, 24];
		const [n1, p1] = ROWS[k] ?? [1, 24];
		if (count <= n1) return p0 * (p1 / p0) ** (Math.log(count / n0) / Math.log(n1 / n0));
	}
	return 680 / count;
}

export function nameSizeOf(pitch: number): number {
	return Math.min(13, pitch * 1.06);
}

/** Where every panel stands. Drawn with the present at the left and turned as a whole when asked. */
export function plateLayout(request: LayoutRequest): PlateLayout {
	const stacked = request.width < STACKED_BELOW;
	const natural = rowPitch(request.names.length);
	const height = (pitch: number) => (stacked ? stackedLayout(request, pitch) : wideLayout(request, pitch)).height;
	const over = height(natural) - request.maxHeight;
	// Height is linear in the pitch except where d has its least height; a few steps of halving are exact enough.
	let [low, high] = over > 0 ? [natural * 0.1, natural] : [natural, natural];
	for (let step = 0; step < 24 && over > 0; step++) {
		const middle = (low + high) / 2;
		if (height(middle) > request.maxHeight) high = middle;
		else low = middle;
	}
	const layout = stacked ? stackedLayout(request, low) : wideLayout(request, low);
	return request.direction === 'present-left' ? layout : turned(layout);
}

function pairsHeight(rest: number): number {
	return Math.max(D_LEAST, (rest * D_SHARE) / (1 - D_SHARE));
}

type Names = { readonly nameSize: number; readonly nameColumns: 0 | 1 | 2 };

/** In two columns a name may be a little larger than the smallest, as far as two rows give room. */
const STAGGERED = { rows: 1.75, mostOfSmallest: 1.15 } as const;

function namesOf({ smallestName }: LayoutRequest, pitch: number, stacked: boolean): Names {
	const single = nameSizeOf(pitch);
	if (single >= smallestName) return { nameSize: single, nameColumns: 1 };
	const staggered = Math.min(pitch * STAGGERED.rows, smallestName * STAGGERED.mostOfSmallest);
	// A phone and a single column have no width for two.
	if (stacked || staggered < smallestName) return { nameSize: single, nameColumns: 0 };
	return { nameSize: staggered, nameColumns: 2 };
}

/** Between the two columns of names; drawing units. */
export const NAME_GAP = 8;

function namesWidth(request: LayoutRequest, { nameSize, nameColumns }: Names): number {
	if (nameColumns === 0) return clamp(10 * TYPE, 24, request.width * 0.2);
	const widest = Math.max(...request.names.map((name) => textWidth(name, nameSize))) + 2;
	return nameColumns === 1 ? clamp(widest, 24, request.width * 0.24) : clamp(2 * widest + NAME_GAP, 24, request.width * 0.3);
}

function sizes(request: LayoutRequest, pitch: number, stacked: boolean) {
	const names = namesOf(request, pitch, stacked);
	return { ...names, rows: request.names.length * pitch, nameWidth: namesWidth(request, names) };
}

function wideLayout(request: LayoutRequest, pitch: number): PlateLayout {
	const { nameSize, nameColumns, rows, nameWidth } = sizes(request, pitch, false);
	const { width } = request;
	const count = request.names.length;
	// Two columns of names take their room from the wing, which can be drawn in; tree and pairs need theirs.
	const wingWidth = Math.min((count * pitch) / 2, width * (nameColumns === 2 ? 0.3 : 0.38));
	const left = Math.max(wingWidth + 8 + nameWidth + 8, width * 0.2 + AXIS_LABELS);
	const endsWidth = clamp(width * 0.15, 84, 150);
	const treeX = EDGE + left;
	const treeWidth = width - EDGE - endsWidth - treeX;
	const rest = HEAD + rows + AXIS + FOOT;
	const dHeight = pairsHeight(rest);
	const namesX = treeX - 8 - nameWidth;
	const dY = HEAD + rows + AXIS;
	const keyRight = treeX - AXIS_LABELS;
	const wing: WingPlace = { count, top: HEAD, pitch, across: (wingWidth * 2) / count, edge: namesX - 8, outward: -1 };
	return {
		...{ width, height: rest + dHeight, stacked: false, direction: 'present-left', pitch, nameSize, nameColumns },
		names: { x: namesX, y: HEAD, width: nameWidth, height: rows },
		wingNames: null,
		tree: { x: treeX, y: HEAD, width: treeWidth, height: rows },
		wing,
		wingBox: { x: wing.edge - wingWidth, y: HEAD, width: wingWidth, height: rows },
		ageAxis: { x: treeX, y: HEAD + rows, width: treeWidth, height: AXIS },
		pairs: { x: treeX, y: dY, width: treeWidth, height: dHeight },
		key: keyRect(keyRight, dY, { height: dHeight, most: Math.min(150, keyRight - EDGE) }),
		ends: { x: treeX + treeWidth, y: dY, width: endsWidth, height: dHeight }
	};
}

function keyRect(rightEdge: number, y: number, { height, most }: { height: number; most: number }): Rect {
	return { x: rightEdge - most, y, width: most, height };
}

function stackedLayout(request: LayoutRequest, pitch: number): PlateLayout {
	const { nameSize, nameColumns, rows, nameWidth } = sizes(request, pitch, true);
	const { width } = request;
	const count = request.names.length;
	const treeX = EDGE + Math.max(nameWidth + 6, AXIS_LABELS + 44);
	const endsWidth = 70;
	const treeWidth = width - EDGE - endsWidth - treeX;
	const axis = AXIS + TYPE;
	const upper = HEAD + rows + axis + FOOT;
	const dHeight = pairsHeight(upper);
	const dY = HEAD + rows + axis;
	const wingTop = upper + dHeight + HEAD + 6;
	const wingWidth = Math.min((count * pitch) / 2, width - nameWidth - 12 - 2 * EDGE);
	const wingPitch = (wingWidth * 2) / count;
	// Wing and repeated names stand in the middle: left to itself the pair would leave half a phone empty.
	const wingLeft = EDGE + Math.max(0, (width - wingWidth - 8 - nameWidth) / 2);
	const wing: WingPlace = { count, top: wingTop, pitch: wingPitch, across: wingPitch, edge: wingLeft + wingWidth, outward: -1 };
	const wingHeight = wingPitch * count;
	const keyRight = treeX - AXIS_LABELS;
	return {
		...{ width, height: wingTop + wingHeight + 6, stacked: true, direction: 'present-left', pitch, nameSize, nameColumns },
		names: { x: treeX - 6 - nameWidth, y: HEAD, width: nameWidth, height: rows },
		wingNames: { x: wing.edge + 8, y: wingTop, width: nameWidth, height: wingHeight },
		tree: { x: treeX, y: HEAD, width: treeWidth, height: rows },
		wing,
		wingBox: { x: wingLeft, y: wingTop, width: wingWidth, height: wingHeight },
		ageAxis: { x: treeX, y: HEAD + rows, width: treeWidth, height: axis },
		pairs: { x: treeX, y: dY, width: treeWidth, height: dHeight },
		key: keyRect(keyRight, dY, { height: dHeight, most: keyRight - EDGE }),
		ends: { x: treeX + treeWidth, y: dY, width: endsWidth, height: dHeight }
	};
}

/** The whole plate turned round: present at the right, root and e at the left. */
function turned(layout: PlateLayout): PlateLayout {
	const flip = (rect: Rect) => mirrored(rect, layout.width);
	return {
		...layout,
		direction: 'present-right',
		names: flip(layout.names),
		wingNames: layout.wingNames && flip(layout.wingNames),
		tree: flip(layout.tree),
		wing: { ...layout.wing, edge: layout.width - layout.wing.edge, outward: 1 },
		wingBox: flip(layout.wingBox),
		ageAxis: flip(layout.ageAxis),
		pairs: flip(layout.pairs),
		key: flip(layout.key),
		ends: flip(layout.ends)
	};
}

/** Places of the present and of the root on the age axis. */
export function ageRange(layout: PlateLayout): [present: number, root: number] {
	const { tree, direction } = layout;
	return direction === 'present-left' ? [tree.x, right(tree)] : [right(tree), tree.x];
}
