import type { AnalysisResult, Finding } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Moments } from '#lib/statistics/mantelMoments.ts';
import { pearsonThreeTail } from '#lib/statistics/momentTails.ts';
import { findFinding } from './words/finding.ts';

/** Below this the null is too lumpy for a curve to check the sampler. */
const FEWEST_FOR_MOMENTS = 10;

type Computed = Pick<AnalysisResult, 'compared' | 'permutation' | 'regression' | 'species'> & {
	readonly trees?: AnalysisResult['trees'] | undefined;
	readonly about?: AnalysisInputs['about'];
	readonly blocks: Pick<AnalysisResult, 'signal' | 'power'>;
	readonly moments: Moments;
	readonly z: number;
	readonly ages: Float64Array;
	readonly parent: Int32Array;
};

/** The finding that computed numbers license. */
export function findingOf({
	compared,
	permutation,
	regression,
	species,
	moments,
	z,
	ages,
	parent,
	trees,
	about,
	blocks
}: Computed): Finding {
	return findFinding({
		measure: compared.measure,
		ageUnit: compared.ageUnit,
		alpha: compared.alpha,
		alternative: compared.alternative,
		species,
		pairs: (species * (species - 1)) / 2,
		slope: regression.slope,
		r: regression.r,
		meanOverlap: compared.meanOverlap,
		rootAge: compared.rootAge,
		nodeAges: internalAges(ages, parent),
		permutation,
		// The closed form speaks of one tree only.
		momentP: trees === undefined ? momentP(moments, z, species) : null,
		transformed: compared.transform !== 'none',
		polytomies: compared.polytomies,
		treesInSet: compared.tree.treesInSet,
		trees,
		...(about === undefined ? {} : { about }),
		signal: blocks.signal,
		power: blocks.power
	});
}

function momentP({ mean, variance, skewness }: Moments, z: number, species: number): number | null {
	if (species < FEWEST_FOR_MOMENTS || skewness === null || !(variance > 0)) return null;
	return pearsonThreeTail((z - mean) / Math.sqrt(variance), skewness);
}

function internalAges(ages: Float64Array, parent: Int32Array): number[] {
	const internal = new Set(parent);
	return [...ages].filter((_, node) => internal.has(node));
}
