import { scaleLinear, type ScaleLinear } from 'd3-scale';
import { type AgeScale, ageScale, ageSpacing, ageTicks } from './ageScale.ts';

type AgeClass = {
	readonly from: number;
	readonly to: number;
	readonly mean: number;
	readonly shuffled: readonly [number, number, number];
};

export type AgeCurvesInput = {
	readonly classes: readonly AgeClass[];
	/** internal nodes and the plain mean across each */
	readonly nodes: readonly { readonly age: number; readonly mean: number }[];
	readonly curves: readonly { readonly name: string; readonly points: readonly (readonly [number, number])[] }[];
	readonly rootAge: number;
};

export type Frame = { readonly left: number; readonly right: number; readonly top: number; readonly foot: number };

export type AgeCurvesDrawing = {
	readonly x: AgeScale;
	readonly y: ScaleLinear<number, number>;
	readonly ageTicks: readonly number[];
	readonly overlapTicks: readonly number[];
	readonly bands: readonly {
		readonly x: number;
		readonly width: number;
		readonly y: number;
		readonly height: number;
		readonly middle: number;
		readonly mean: number;
	}[];
	readonly nodes: readonly { readonly x: number; readonly y: number }[];
	/** a path, and where its name stands */
	readonly curves: readonly { readonly name: string; readonly path: string; readonly y: number }[];
	readonly logarithmic: boolean;
};

/** A class of one age would have no width; drawing units. */
const LEAST_WIDTH = 6;
/** Between the names of two curves; drawing units. */
const LINE_HEIGHT = 14;
const AGE_GAP = 56;

/** Lays out means by age class, their bands, node means and curves; present at the left, as the plate stands by default. */
export function ageCurves({ classes, nodes, curves, rootAge }: AgeCurvesInput, frame: Frame): AgeCurvesDrawing {
	const spacing = ageSpacing(
		nodes.map(({ age }) => age),
		rootAge
	);
	const x = ageScale(spacing, rootAge, [frame.left, frame.right]);
	const values = [...nodes.map(({ mean }) => mean), ...classes.flatMap(({ mean, shuffled }) => [mean, ...shuffled])];
	const isShare = Math.min(...values) >= 0 && Math.max(...values) <= 1;
	const y = scaleLinear(isShare ? [0, 1] : [Math.min(...values), Math.max(...values)], [frame.foot, frame.top]);
	if (!isShare) y.nice();
	return {
		x,
		y,
		ageTicks: ageTicks(x, spacing, AGE_GAP),
		overlapTicks: y.ticks(5),
		bands: classes.map(({ from, to, mean, shuffled: [low, middle, high] }) => {
			const width = Math.max(LEAST_WIDTH, x(to) - x(from));
			const start = Math.min((x(from) + x(to) - width) / 2, frame.right - width);
			return { x: start, width, y: y(high), height: y(low) - y(high), middle: y(middle), mean: y(mean) };
		}),
		nodes: nodes.map(({ age, mean }) => ({ x: x(age), y: y(mean) })),
		curves: apart(
			curves.map(({ name, points }) => ({
				name,
				path: `M${points.map(([age, value]) => `${x(age).toFixed(1)} ${y(value).toFixed(1)}`).join('L')}`,
				y: y(points.at(-1)?.[1] ?? 0)
			}))
		),
		logarithmic: spacing.kind === 'log'
	};
}

/** Names that would stand on one another, moved up from the lowest. */
function apart<Named extends { readonly y: number }>(curves: readonly Named[]): Named[] {
	const order = curves.toSorted((a, b) => b.y - a.y);
	let above = Number.POSITIVE_INFINITY;
	const moved = new Map(
		order.map((curve) => {
			above = Math.min(curve.y, above - LINE_HEIGHT);
			return [curve, above];
		})
	);
	return curves.map((curve) => ({ ...curve, y: moved.get(curve) ?? curve.y }));
}
