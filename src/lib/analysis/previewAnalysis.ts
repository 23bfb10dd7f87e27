import type { AnalysisInputs, AnalysisPreview } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { crownNode } from '#lib/phylogeny/nodeAges.ts';
import { distinctAges } from '#lib/statistics/distinctAges.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { isExact } from '#lib/statistics/permutationTest.ts';
import { declaredStatistics } from './alsoTested.ts';
import { smallestFreeP } from './attainable.ts';
import { cladeGroups } from './cladeGroups.ts';
import { plannedCovariates } from './covariates/plannedCovariates.ts';
import { nicheTraits } from './nicheTraits.ts';
import { prepareAnalysis } from './prepareAnalysis.ts';
import { refuseAgeZero } from './refuseAgeZero.ts';
import { previewOverTrees } from './trees/previewOverTrees.ts';

/**
 * What an analysis would use and could at best say, without running it.
 * @throws {InputError} as `prepareAnalysis`, `preparePermutation`, `cladeGroups`, `nicheTraits` and `plannedCovariates`: exactly what would stop the analysis itself
 */
export function previewAnalysis(inputs: AnalysisInputs, plan: Plan): AnalysisPreview {
	const prepared = prepareAnalysis(inputs, plan);
	const { tree, ages, species, response, dropped, outgroup, remarks } = prepared;
	nicheTraits(prepared, inputs, plan);
	plannedCovariates(prepared, inputs, plan);
	const design = preparePermutation({
		tree: { parent: tree.parent, ages },
		overlap: response,
		statistics: declaredStatistics(plan)
	});
	refuseAgeZero(design, plan);
	cladeGroups(prepared, plan);
	const exact = isExact(design, false, plan.permutations);
	const sides = plan.alternative === 'two-sided' ? 2 : 1;
	return {
		species,
		dropped,
		pairs: (species.length * (species.length - 1)) / 2,
		distinctAges: distinctAges(lowerTriangle(mrcaAges(tree, ages), species.length)),
		rootAge: ages[crownNode(tree)] ?? 0,
		sides: design.sides,
		rootPairShare: design.rootPairShare,
		smallestP: Math.min(1, sides * smallestFreeP(tree, ages, design, { exact, shuffles: plan.permutations })),
		exact,
		outgroup: outgroup && { species: outgroup.species, rest: outgroup.rest },
		remarks,
		...previewOverTrees(prepared, plan)
	};
}
