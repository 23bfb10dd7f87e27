import { type AgedTree, treeShape } from '../agedTree.ts';
import { assertOverlap } from '../assertOverlap.ts';
import { pairBlocks } from '../pairBlocks.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import { type FallCurve, fallCurve } from './fitFall.ts';
import { fallShape, type FallShape } from './fallShape.ts';
import type { FallMeasure } from './gaussianOverlap.ts';
import { halfOverlapAge, type HalfOverlapAge } from './halfOverlapAge.ts';
import { nodeAgesOf, nodeMeans } from './nodeMeans.ts';
import { AXES, type Axes, expectedOverlap, halfOverlapTheta } from './randomWalkFall.ts';
import { fallReader } from './walkedFalls.ts';

/** Random walks at the fitted curve: the ends of the range err by about .06 of its width. */
const WALKS = 199;
/** Points of a drawn curve; their ages stand closer near 0, where the curve is steep. */
const DRAWN_POINTS = 48;
/** Chunks of a stream that each number of axes may take. */
const CHUNKS_PER_AXES = 16;

/** What the half-overlap age would have been over a shared floor, and under a ceiling, of all overlaps. */
const FLOOR = 0.3;
const CEILING = 0.8;

export type FallFitted = HalfOverlapAge & {
	readonly axes: Axes;
	/** [age, overlap] from age 0 to the root */
	readonly curve: readonly (readonly [number, number])[];
	readonly shape: FallShape;
};

export type FallDescription = {
	readonly fits: readonly FallFitted[];
	/** one axis; overlaps o read as floor + (1 - floor) o */
	readonly withFloor: { readonly floor: number; readonly halfOverlapAge: number | null };
	/** one axis; overlaps o read as ceiling · o */
	readonly withCeiling: { readonly ceiling: number; readonly halfOverlapAge: number | null };
	readonly simulations: number;
};

export type FallInput = {
	readonly measure: FallMeasure;
	readonly tree: AgedTree;
	/** shape (n, n), row-major, tips in tree order */
	readonly overlap: Float64Array;
	/** whole number in [0, 2^32) */
	readonly seed: number;
};

/**
 * How overlaps look beside a random walk of niche centres on 1, 2 or 4 axes: the fitted curve, the age at which it
 * passes one half, and whether young pairs follow it. No k is given: it means nothing outside one comparison area.
 *
 * Cost: about 2,100 walks, each with every pair once.
 *
 * @throws {InputError} `non-finite`, `asymmetric`
 */
export function describeFall({ measure, tree, overlap, seed }: FallInput): FallDescription {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	assertOverlap(overlap, tipCount);
	const layout = pairBlocks(shape);
	const nodes = nodeAgesOf(tree, shape, layout);
	const rootAge = Math.max(...nodes.ages);
	const means = nodeMeans(layout, (row, column) => overlap[row * tipCount + column] ?? Number.NaN);

	const fits = AXES.map((axes, i): FallFitted => {
		const reader = fallReader(measure, axes, tree);
		const observed = reader.read(means);
		const walked = reader.walk(observed.k, WALKS, { seed, domain: STREAM_DOMAIN.fallBootstrap, chunk: i });
		const theta = halfOverlapTheta(measure, axes);
		return {
			axes,
			...halfOverlapAge({ k: observed.k, walked: walked.map(({ k }) => k), theta, rootAge }),
			curve: drawnCurve(measure, axes, { k: observed.k, rootAge }),
			shape: fallShape({ reader, observed, walked, seed, chunk: i * CHUNKS_PER_AXES })
		};
	});
	const curve = fallCurve(measure, 1, nodes);
	const halfWith = (change: (mean: number) => number) =>
		halfAge(curve, means.map(change), { theta: halfOverlapTheta(measure, 1), rootAge });
	return {
		fits,
		withFloor: { floor: FLOOR, halfOverlapAge: halfWith((mean) => FLOOR + (1 - FLOOR) * mean) },
		withCeiling: { ceiling: CEILING, halfOverlapAge: halfWith((mean) => CEILING * mean) },
		simulations: WALKS
	};
}

function halfAge(curve: FallCurve, means: Float64Array, { theta, rootAge }: { theta: number; rootAge: number }): number | null {
	const age = theta / curve.fit(means).k;
	return age <= rootAge ? age : null;
}

function drawnCurve(measure: FallMeasure, axes: Axes, { k, rootAge }: { k: number; rootAge: number }): [number, number][] {
	return Array.from({ length: DRAWN_POINTS + 1 }, (_, i) => {
		const age = rootAge * (i / DRAWN_POINTS) ** 2;
		return [age, expectedOverlap(measure, axes, k * age)];
	});
}
