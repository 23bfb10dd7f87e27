import type { NodeAverage } from '#lib/contracts/drawnPlate.ts';
import { ageScale, ageSpacing, ageTicks, tickTexts, type AgeScale, type AgeSpacing } from './ageScale.ts';
import { agedLinePath, type AgedLine, type LineFrame } from './agedLine.ts';
import { endsScene, type EndsScene } from './endsScene.ts';
import { nameSpans, type NameSpan } from './nameSpans.ts';
import { nodeDiamonds, type Diamond } from './nodeDiamonds.ts';
import { overlapAxis, overlapBins, rampShare, type OverlapAxis, type OverlapBin } from './overlapAxis.ts';
import { columnSizes, pairColumns, type ColumnSizes, type PairColumns } from './pairColumns.ts';
import { ageRange, nameSizeOf, plateLayout, TYPE, type AgeDirection, type PlateLayout } from './plateLayout.ts';
import { pairPlace, plateModel, type PlateInput, type PlateModel } from './plateModel.ts';
import { figureNames } from './speciesNames.ts';
import { treeInk, treeLayout, type TreeInk, type TreePlace } from './treeLayout.ts';
import { ageBarsPath, treeLinesPath } from './treesInk.ts';
import { wingInk, type WingInk } from './wingGeometry.ts';

export type SceneRequest = {
	readonly width: number;
	readonly direction: AgeDirection;
	readonly maxHeight: number;
	readonly smallestName: number;
	readonly abbreviateGenus: boolean;
	readonly average: NodeAverage;
};

/** Everything of one plate, placed: the components only draw it. */
export type PlateScene = {
	readonly input: PlateInput;
	readonly model: PlateModel;
	readonly layout: PlateLayout;
	readonly names: readonly string[];
	/** clades named instead of species; empty where every name is shown */
	readonly spans: readonly NameSpan[];
	/** the same beside a wing that stands below, whose rows may be closer */
	readonly wingSpans: readonly NameSpan[];
	readonly spacing: AgeSpacing;
	readonly x: AgeScale;
	readonly ageTicks: readonly { readonly age: number; readonly text: string }[];
	readonly axis: OverlapAxis;
	readonly treePlace: TreePlace;
	readonly tree: TreeInk;
	/** null where cells are so many that the wing is an image */
	readonly wing: WingInk | null;
	readonly sizes: ColumnSizes;
	readonly columns: PairColumns;
	readonly diamonds: readonly Diamond[];
	readonly bins: readonly OverlapBin[];
	readonly fan: readonly string[];
	readonly observed: string;
	readonly nodeMeans: string;
	/** lines and node ages of the other trees; '' on a plate of one tree */
	readonly treeLines: string;
	readonly ageBars: string;
	readonly ends: EndsScene;
};

/** Above so many species the wing is one image. */
export const CELLS_DRAWN_UP_TO = 80;
const TICK_GAP = 3.4 * TYPE;
export const FAN_LINES = 120;

export function plateScene(input: PlateInput, request: SceneRequest): PlateScene {
	const model = plateModel(input, request.average);
	const names = figureNames(model.species, request.abbreviateGenus);
	const layout = plateLayout({ ...request, names });
	const nodeAges = model.nodes.map(({ age }) => age);
	const spacing = ageSpacing(nodeAges, model.rootAge);
	const x = ageScale(spacing, model.rootAge, ageRange(layout));
	const axis = overlapAxis(model.overlap, layout.pairs);
	const treePlace = treeLayout(model, x, { top: layout.tree.y, pitch: layout.pitch });
	const sizes = columnSizes(model.nodes, layout.pairs.width);
	const ticks = ageTicks(x, spacing, TICK_GAP);
	const texts = tickTexts(ticks);
	return {
		...{ input, model, layout, names, spacing, x, axis, treePlace, sizes },
		spans: layout.nameColumns > 0 ? [] : spansFor(model, layout.pitch),
		wingSpans: nameSizeOf(layout.wing.pitch) >= request.smallestName ? [] : spansFor(model, layout.wing.pitch),
		ageTicks: ticks.map((age, index) => ({ age, text: texts[index] ?? '' })),
		tree: treeInk(model, treePlace),
		wing: model.species.length <= CELLS_DRAWN_UP_TO ? wingInk(layout.wing, wingShare(model, axis)) : null,
		columns: pairColumns(model, x, axis, sizes),
		diamonds: nodeDiamonds(model, x, axis),
		bins: overlapBins(axis, model.overlap),
		...lines(input, { x, spacing, axis }, request.average),
		treeLines: input.trees ? treeLinesPath(input.trees, { x, spacing, axis }) : '',
		ageBars: input.trees ? ageBarsPath(input.trees, treePlace, { x, pitch: layout.pitch }) : '',
		ends: endsScene(input, {
			panel: layout.ends,
			axis,
			rootAge: model.rootAge,
			stacked: layout.stacked,
			inset: sizes.halfWidth + 7
		})
	};
}

function spansFor(model: PlateModel, pitch: number): NameSpan[] {
	const lineRows = (TYPE * 1.15) / pitch;
	return nameSpans(model, lineRows, Math.max(lineRows * 3, model.species.length / 8));
}

/** Place of a pair on the ramp, by rows. */
export function wingShare(model: PlateModel, axis: OverlapAxis): (i: number, j: number) => number {
	return (i, j) => rampShare(axis, model.overlap[pairPlace(i, j)] ?? Number.NaN);
}

function lines(input: PlateInput, frame: LineFrame, average: NodeAverage) {
	const { meanAge, meanOverlap, fanSlopes } = input.plate;
	const through = ({ slope, intercept }: { slope: number; intercept: number }): AgedLine => ({ slope, age: 0, value: intercept });
	const means = input.nodeAverages[average];
	const every = Math.max(1, Math.ceil(fanSlopes.length / FAN_LINES));
	const thinned = fanSlopes.filter((_, index) => index % every === 0);
	return {
		fan: thinned.map((slope) => agedLinePath({ slope, age: meanAge, value: meanOverlap }, frame)),
		observed: agedLinePath(through(input.regression), frame),
		nodeMeans: means ? agedLinePath(through(means), frame) : ''
	};
}
