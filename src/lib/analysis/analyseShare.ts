import type { AnalysisInputs, ComputeProgress } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { linearRegression } from '#lib/statistics/linearRegression.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { type PermutationProgress, type SharedTallies, tallyShare } from '#lib/statistics/permutationTest.ts';
import type { ChunkShare } from '#lib/statistics/shuffleBatches.ts';
import { declaredStatistics } from './alsoTested.ts';
import { prepareAnalysis } from './prepareAnalysis.ts';
import { progressReporter } from './progressReporter.ts';
import { refuseAgeZero } from './refuseAgeZero.ts';
import { testOptions } from './testOptions.ts';

type Shared = { readonly inputs: AnalysisInputs; readonly plan: Plan; readonly share: ChunkShare };

/**
 * The shuffles of an analysis that fall to one share of its chunks. `analyse` takes all shares together and gives the
 * bits that it would give alone.
 *
 * @param report - told after every chunk; it may throw to stop
 * @throws {InputError} as `analyse`, which would refuse the same materials
 */
export function analyseShare({ inputs, plan, share }: Shared, report?: (progress: ComputeProgress) => void): SharedTallies {
	const { tree, ages, species, response } = prepareAnalysis(inputs, plan);
	const statistics = declaredStatistics(plan);
	const design = preparePermutation({ tree: { parent: tree.parent, ages }, overlap: response, statistics });
	refuseAgeZero(design, plan);
	const pairAges = lowerTriangle(mrcaAges(tree, ages), species.length);
	const lower = { ages: pairAges, overlaps: lowerTriangle(response, species.length) };
	const onProgress = report && shareReporter({ plan, lower, report });
	return tallyShare(design, share, { ...testOptions(plan), ...(onProgress ? { onProgress } : {}) });
}

type Reporting = {
	readonly plan: Plan;
	readonly lower: { readonly ages: Float64Array; readonly overlaps: Float64Array };
	readonly report: (progress: ComputeProgress) => void;
};

/** The progress of a share with the counts that the shares' common p is made of. */
function shareReporter({ plan, lower, report }: Reporting): (progress: PermutationProgress) => void {
	let share = { done: 0, less: 0, greater: 0 };
	const regression = linearRegression(lower.ages, lower.overlaps);
	const tell = progressReporter({ plan, regression, lower, report: (progress) => report({ ...progress, share }) });
	return (progress) => {
		const counts = progress.asked.counts[plan.statistic];
		if (progress.question === 'free' && counts) share = { done: progress.asked.done, ...counts };
		tell(progress);
	};
}
