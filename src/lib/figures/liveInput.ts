import type { PlateData } from '#lib/contracts/analysisResult.ts';
import type { PlateInput } from './plateModel.ts';

/** What is known of a plate before its test has run: tree, names and overlaps. */
export type PlateMaterials = Pick<PlateData, 'tree' | 'species' | 'overlapLower'>;

/** The observed line and its pivot, as the first message of a running analysis tells them. */
export type ObservedLine = { readonly slope: number; readonly meanAge: number; readonly meanOverlap: number };

const BINS = 40;

/** A plate while the shuffles run: the observed line at once, the fan and e growing with the slopes that have arrived. */
export function liveInput(materials: PlateMaterials, line: ObservedLine, slopes: readonly number[]): PlateInput {
	const { slope, meanAge, meanOverlap } = line;
	const plate = {
		...materials,
		meanAge,
		meanOverlap,
		fanSlopes: [...slopes],
		slopeHistogram: histogramOf(slopes),
		nodeSlopeHistogram: null
	};
	const regression = { slope, intercept: meanOverlap - slope * meanAge };
	return { plate, regression, nodeAverages: { nodes: [], nested: null, plain: null }, permutation: null };
}

/** Equal bins from the least to the greatest value; no bins without values. */
export function histogramOf(values: readonly number[]): PlateData['slopeHistogram'] {
	if (values.length === 0) return { edges: [], counts: [] };
	const low = Math.min(...values);
	const width = (Math.max(...values) - low) / BINS || 1e-9;
	const counts = new Array<number>(BINS).fill(0);
	for (const value of values) {
		const bin = Math.min(BINS - 1, Math.floor((value - low) / width));
		counts[bin] = (counts[bin] ?? 0) + 1;
	}
	return { edges: Array.from({ length: BINS + 1 }, (_, bin) => low + bin * width), counts };
}
