import type { AnalysisProgress, AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { crownNode } from '#lib/phylogeny/nodeAges.ts';
import { polytomies } from '#lib/phylogeny/treeShape.ts';
import { ultrametricSpread } from '#lib/phylogeny/ultrametric.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { linearRegression, type LinearRegression } from '#lib/statistics/linearRegression.ts';
import { mantel } from '#lib/statistics/mantel.ts';
import { mantelMoments } from '#lib/statistics/mantelMoments.ts';
import { nodeAverages } from '#lib/statistics/nodeAverages.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { type PermutationOutcome, permutationTest, type SharedTallies } from '#lib/statistics/permutationTest.ts';
import { alsoTested, declaredStatistics } from './alsoTested.ts';
import { resultBlocks } from './blocks/resultBlocks.ts';
import { findingOf } from './findingOf.ts';
import { describePermutation } from './describePermutation.ts';
import { nodeRows } from './nodeRows.ts';
import { plateData } from './plateData.ts';
import { prepareAnalysis, type PreparedAnalysis } from './prepareAnalysis.ts';
import { progressReporter } from './progressReporter.ts';
import { refuseAgeZero } from './refuseAgeZero.ts';
import { testOptions } from './testOptions.ts';
import { judgeOverTrees } from './trees/judgeOverTrees.ts';

/** Changes whenever a published number could change; printed in every report. */
export const ENGINE = { version: '1.1.0', kernel: 'webassembly-blocks' } as const;

export type Report = (progress: AnalysisProgress) => void;

/**
 * The whole analysis: a pure function of its inputs and its plan, which holds the seed. Equal arguments give equal bits.
 *
 * @param report - told after every chunk of shuffles; it may throw to stop
 * @param shares - of its shuffles that `analyseShare` has run; together all of them, or none
 * @throws {InputError} with a sentence when the materials do not allow the analysis; see `prepareAnalysis`
 */
export function analyse(
	inputs: AnalysisInputs,
	plan: Plan,
	report?: Report,
	shares: readonly SharedTallies[] = []
): AnalysisResult {
	const prepared = prepareAnalysis(inputs, plan);
	const { tree, ages, species, response } = prepared;
	const pairAges = mrcaAges(tree, ages);
	const lower = { ages: lowerTriangle(pairAges, species.length), overlaps: lowerTriangle(response, species.length) };
	const line = pick(linearRegression(lower.ages, lower.overlaps));

	const design = preparePermutation({
		tree: { parent: tree.parent, ages },
		overlap: response,
		statistics: declaredStatistics(plan)
	});
	refuseAgeZero(design, plan);
	const reporter = report && progressReporter({ plan, regression: line, lower, report });
	const overTrees = judgeOverTrees({ prepared, plan, design, onProgress: reporter });
	const onProgress = overTrees?.onProgress ?? reporter;
	const outcome = permutationTest(design, { ...testOptions(plan), shares, ...(onProgress ? { onProgress } : {}) });

	const moments = mantelMoments(pairAges, response);
	const compared = describeCompared(prepared, inputs, plan, lower.overlaps);
	const mantelStatistics = mantel(lower.ages, lower.overlaps);
	const judged = overTrees?.outcome ?? outcome;
	const described = describePermutation({ prepared, design, outcome: judged, plan, moments, pairAges: lower.ages });
	const permutation = overTrees?.permutationOf(described) ?? described;
	const trees = overTrees?.blockOf(permutation);
	const blocks = resultBlocks({ inputs, plan, prepared, design, outcome, regression: line, pairAges, lower });
	return {
		compared,
		species: species.length,
		pairs: lower.ages.length,
		dropped: [...prepared.dropped],
		remarks: [...prepared.remarks],
		regression: line,
		permutation: { ...permutation, ...alsoTested(overTrees?.outcome ?? design, judged, plan) },
		mantel: mantelStatistics,
		nodeAverages: describeNodes(prepared, outcome),
		...(trees === undefined ? {} : { trees }),
		...blocks,
		finding: findingOf({
			compared,
			trees,
			about: inputs.about,
			blocks,
			permutation,
			regression: line,
			moments,
			z: mantelStatistics.z,
			ages,
			parent: tree.parent,
			species: species.length
		}),
		engine: { version: ENGINE.version, seed: plan.seed, kernel: ENGINE.kernel },
		plate: plateData({ prepared, outcome, lower })
	};
}

function describeCompared(
	prepared: PreparedAnalysis,
	inputs: AnalysisInputs,
	plan: Plan,
	overlaps: Float64Array
): AnalysisResult['compared'] {
	const { chosen, tree, ages } = prepared;
	return {
		measure: inputs.measure,
		ageUnit: inputs.ageUnit,
		tree: { index: chosen.index, name: chosen.name, treesInSet: chosen.treesInSet },
		rootAge: ages[crownNode(tree)] ?? 0,
		polytomies: polytomies(tree),
		ultrametricSpread: ultrametricSpread(chosen.tree),
		levelled: chosen.levelled,
		meanOverlap: overlaps.reduce((sum, value) => sum + value, 0) / overlaps.length,
		alternative: plan.alternative,
		transform: plan.transform,
		alpha: plan.alpha
	};
}

function pick({ residualStandardDeviation, ...line }: LinearRegression): AnalysisResult['regression'] {
	if (residualStandardDeviation === null) throw new Error('Four species or more give six pairs: the residuals have a spread.');
	const { slope, intercept, r, rSquared } = line;
	return { slope, intercept, r, rSquared, residualStandardDeviation };
}

function describeNodes(prepared: PreparedAnalysis, outcome: PermutationOutcome): AnalysisResult['nodeAverages'] {
	const averages = nodeAverages({ parent: prepared.tree.parent, ages: prepared.ages }, prepared.response);
	return {
		nodes: nodeRows(prepared, averages),
		nested: { ...averages.nested, ...nodeTails(outcome, 'nodes-nested') },
		plain: { ...averages.plain, ...nodeTails(outcome, 'nodes-plain') }
	};
}

function nodeTails({ free }: PermutationOutcome, statistic: 'nodes-nested' | 'nodes-plain') {
	const interceptTails = tails(free.statistics[`${statistic}-intercept`]);
	return { ...tails(free.statistics[statistic]), interceptTails };
}

function tails(tested: { pLess: number; pGreater: number; pTwoSided: number } | undefined) {
	if (tested === undefined) throw new Error('Node averages are tested in every run.');
	return { pLess: tested.pLess, pGreater: tested.pGreater, pTwoSided: tested.pTwoSided };
}
