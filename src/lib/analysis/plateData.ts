import type { PlateData } from '#lib/contracts/analysisResult.ts';
import { histogram } from '#lib/statistics/histogram.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';
import type { PermutationOutcome } from '#lib/statistics/permutationTest.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';

const FAN_LINES = 120;
const HISTOGRAM_BINS = 60;

type Drawn = {
	readonly prepared: PreparedAnalysis;
	readonly outcome: PermutationOutcome;
	/** shape (pairs,) each; overlaps as the statistics saw them */
	readonly lower: { readonly ages: Float64Array; readonly overlaps: Float64Array };
};

/** What the plate draws and the tables do not hold. */
export function plateData({ prepared, outcome, lower }: Drawn): PlateData {
	const slopes = outcome.free.values.slope;
	if (slopes === undefined) throw new Error('The slopes of the shuffles are kept in every run.');
	const nodeSlopes = outcome.free.values['nodes-plain'];
	return {
		tree: { parent: [...prepared.tree.parent], age: [...prepared.ages], label: [...prepared.tree.label] },
		species: [...prepared.species],
		overlapLower: [...lowerTriangle(prepared.response, prepared.species.length)],
		meanAge: mean(lower.ages),
		meanOverlap: mean(lower.overlaps),
		fanSlopes: thin(slopes, FAN_LINES),
		slopeHistogram: histogram(slopes, HISTOGRAM_BINS),
		nodeSlopeHistogram: nodeSlopes === undefined ? null : histogram(nodeSlopes, HISTOGRAM_BINS)
	};
}

function mean(values: Float64Array): number {
	return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** Values at even steps of the stream: no choice by size, so the fan is a fair sample. */
function thin(values: Float64Array, count: number): number[] {
	const step = Math.max(1, values.length / count);
	return Array.from({ length: Math.min(count, values.length) }, (_, i) => values[Math.floor(i * step)] ?? 0);
}
