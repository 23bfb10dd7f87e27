import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { monteCarloError, permutationPValue } from '#lib/statistics/permutationPValue.ts';
import type { PermutationProgress } from '#lib/statistics/permutationTest.ts';
import type { TailCounts } from '#lib/statistics/tally.ts';

/** Lines passed on from each chunk: enough to see the fan grow, few enough to send. */
const LINES_PER_CHUNK = 4;

type Reporting = {
	readonly plan: Plan;
	readonly regression: { readonly slope: number };
	readonly lower: { readonly ages: Float64Array; readonly overlaps: Float64Array };
	readonly report: (progress: AnalysisProgress) => void;
};

/** Turns the engine's progress into what a page shows: p so far with its error, and a few new lines. */
export function progressReporter({ plan, regression, lower, report }: Reporting): (progress: PermutationProgress) => void {
	const still = { slope: regression.slope, meanAge: mean(lower.ages), meanOverlap: mean(lower.overlaps) };
	let known = { asExtreme: 0, p: 1, monteCarloStandardError: 0 };
	return ({ question, done, total, asked, newSlopes }) => {
		const counts = asked.counts[plan.statistic];
		if (question === 'free' && counts) known = pSoFar(plan, { done: asked.done, counts });
		report({ done, total, ...known, ...still, newSlopes: [...newSlopes.subarray(0, LINES_PER_CHUNK)] });
	};
}

/** p of the shuffles so far in the tail of the plan, with its error. */
export function pSoFar(
	plan: Plan,
	{ done, counts }: { readonly done: number; readonly counts: TailCounts }
): Pick<AnalysisProgress, 'asExtreme' | 'p' | 'monteCarloStandardError'> {
	const { pLess, pGreater, pTwoSided } = permutationPValue(counts, done, false);
	const p = plan.alternative === 'less' ? pLess : plan.alternative === 'greater' ? pGreater : pTwoSided;
	const asExtreme =
		plan.alternative === 'less'
			? counts.less
			: plan.alternative === 'greater'
				? counts.greater
				: Math.min(counts.less, counts.greater);
	return { asExtreme, p, monteCarloStandardError: monteCarloError(p, done) };
}

function mean(values: Float64Array): number {
	return values.reduce((sum, value) => sum + value, 0) / values.length;
}
