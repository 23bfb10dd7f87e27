import { ALL_DIAMONDS_UP_TO, DOTS_AT_MOST } from '#lib/contracts/drawnPlate.ts';
import { markHeight, overlapBins, rampShare, type OverlapAxis } from './overlapAxis.ts';
import { eachPairAcross, pairPlace, type PlateModel, type PlateNode } from './plateModel.ts';
import { swarm } from './swarm.ts';

const SAME_PLACE = 0.75;

export type PairDot = {
	readonly x: number;
	readonly y: number;
	readonly share: number;
	readonly node: number;
	readonly i: number;
	readonly j: number;
};
export type StripBar = {
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
	readonly share: number;
};
export type PairColumns = {
	readonly dots: readonly PairDot[];
	readonly bars: readonly StripBar[];
	/** pairs in the fullest bin of all strips, which has the full width */ readonly most: number;
};

/** Half the widest bar of a strip, within these; drawing units. */
const HALF_WIDTHS = [6, 15] as const;

export type ColumnSizes = {
	readonly dotRadius: number;
	readonly halfWidth: number;
	/** pairs at full width; the fullest bin when absent */ readonly most?: number;
};

type Pair = { readonly i: number; readonly j: number; readonly value: number; readonly node: number };

/** Marks shrink as the tree grows, so that neighbouring columns stay apart. */
export function columnSizes(nodes: readonly PlateNode[], panelWidth: number): ColumnSizes {
	const nodeCount = nodes.length;
	const strips = nodes.filter(({ pairCount }) => pairCount > DOTS_AT_MOST).length;
	const [narrow, wide] = HALF_WIDTHS;
	const dotRadius = nodeCount <= 12 ? 3.2 : nodeCount <= 40 ? 2.7 : nodeCount <= 100 ? 2.1 : 1.6;
	return { dotRadius, halfWidth: Math.max(narrow, Math.min(wide, (panelWidth / Math.max(1, strips)) * 0.4)) };
}

/**
 * The pairs under every node: dots in a fixed swarm, or a strip histogram mirrored about the node's age. Nodes that share
 * a place on the axis share a column. The bars of all strips have one scale, by the square root of the count: next to a
 * root with thousands of pairs a node with twenty would else be a thread. A node's only pair is drawn as its filled diamond and not here, unless diamonds are thinned.
 */
export function pairColumns(
	model: PlateModel,
	xOfAge: (age: number) => number,
	axis: OverlapAxis,
	sizes: ColumnSizes
): PairColumns {
	const columns = groupByPlace(model, xOfAge);
	const strips = columns
		.filter(({ pairs }) => pairs.length > DOTS_AT_MOST)
		.map(({ x, pairs }) => ({
			x,
			bins: overlapBins(
				axis,
				pairs.map(({ value }) => value)
			)
		}));
	const most = sizes.most ?? Math.max(1, ...strips.flatMap(({ bins }) => bins.map(({ count }) => count)));
	const bars = strips.flatMap(({ x, bins }) =>
		bins.map(({ y, height, count, share }): StripBar => {
			const half = Math.max(0.8, sizes.halfWidth * Math.sqrt(count / most));
			return { x: x - half, y: y + height * 0.04, width: 2 * half, height: height * 0.92, share };
		})
	);
	const dots = columns
		.filter(({ pairs }) => pairs.length <= DOTS_AT_MOST)
		.flatMap(({ x, pairs }) => columnDots(x, pairs, axis, sizes.dotRadius));
	return { dots, bars, most };
}

function columnDots(x: number, pairs: readonly Pair[], axis: OverlapAxis, radius: number): PairDot[] {
	const heights = pairs.map(({ value }) => markHeight(axis, value));
	const offsets = swarm(heights, radius);
	return pairs.map(({ value, ...pair }, index) => ({
		...pair,
		x: x + (offsets[index] ?? 0),
		y: heights[index] ?? 0,
		share: rampShare(axis, value)
	}));
}

function groupByPlace(model: PlateModel, xOfAge: (age: number) => number): { x: number; pairs: Pair[] }[] {
	const onlyDiamonds = model.nodes.length <= ALL_DIAMONDS_UP_TO;
	const columns: { x: number; pairs: Pair[] }[] = [];
	const byAge = [...model.nodes].sort((a, b) => a.age - b.age || a.node - b.node);
	for (const node of byAge) {
		if (onlyDiamonds && node.pairCount === 1) continue;
		const x = xOfAge(node.age);
		const last = columns.at(-1);
		if (last && Math.abs(last.x - x) < SAME_PLACE) last.pairs.push(...pairsAcross(model, node));
		else columns.push({ x, pairs: pairsAcross(model, node) });
	}
	return columns;
}

/** The pairs across one node with their overlaps. */
export function pairsAcross(model: PlateModel, node: PlateNode): Pair[] {
	const pairs: Pair[] = [];
	eachPairAcross(node.sides, (i, j) =>
		pairs.push({ i, j, value: model.overlap[pairPlace(i, j)] ?? Number.NaN, node: node.node })
	);
	return pairs;
}
