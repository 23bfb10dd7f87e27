import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Alternative, Plan } from '#lib/contracts/plan.ts';
import { clopperPearson } from '#lib/statistics/clopperPearson.ts';
import { distinctAges } from '#lib/statistics/distinctAges.ts';
import type { Moments } from '#lib/statistics/mantelMoments.ts';
import type { PermutationDesign } from '#lib/statistics/permutationDesign.ts';
import { monteCarloError } from '#lib/statistics/permutationPValue.ts';
import type { NullOutcome, PermutationOutcome, TestedStatistic } from '#lib/statistics/permutationTest.ts';
import { quantiles } from '#lib/statistics/quantiles.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { smallestFreeP, smallestWithinP } from './attainable.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';

const QUANTILES = [0, 0.025, 0.05, 0.25, 0.5, 0.75, 0.95, 0.975, 1] as const;
const INTERVAL_LEVEL = 0.95;

type Described = {
	readonly prepared: PreparedAnalysis;
	readonly design: PermutationDesign;
	readonly outcome: PermutationOutcome;
	readonly plan: Plan;
	readonly moments: Moments;
	/** shape (pairs,) */
	readonly pairAges: Float64Array;
};

/** The block `permutation` of a result: the plan's statistic, in the tail the plan declared. */
export function describePermutation({
	prepared,
	design,
	outcome,
	plan,
	moments,
	pairAges
}: Described): AnalysisResult['permutation'] {
	const { free } = outcome;
	const tested = testedStatistic(free, plan);
	const p = tailOf(tested, plan.alternative);
	const asExtreme = countOf(tested, plan.alternative);
	const sides = plan.alternative === 'two-sided' ? 2 : 1;
	const values = free.values[plan.statistic];
	return {
		statistic: plan.statistic,
		observed: tested.observed,
		count: free.count,
		exact: free.exact,
		asExtreme,
		p,
		pLess: tested.pLess,
		pGreater: tested.pGreater,
		pTwoSided: tested.pTwoSided,
		monteCarloStandardError: free.exact ? 0 : sides * monteCarloError(Math.min(1, p / sides), free.count),
		interval: free.exact ? null : interval(asExtreme, free.count, sides),
		smallestP: Math.min(
			1,
			sides * smallestFreeP(prepared.tree, prepared.ages, design, { exact: free.exact, shuffles: plan.permutations })
		),
		distinctAges: distinctAges(pairAges),
		moments: { statistic: 'z', mean: moments.mean, variance: moments.variance, skewness: moments.skewness },
		quantiles: values === undefined ? [] : quantiles(values, QUANTILES),
		withinDeepestSplit: describeWithin(outcome.within, { prepared, design, plan, sides })
	};
}

function describeWithin(
	within: PermutationOutcome['within'],
	{ prepared, design, plan, sides }: Pick<Described, 'prepared' | 'design' | 'plan'> & { sides: number }
): AnalysisResult['permutation']['withinDeepestSplit'] {
	if (within === null) return null;
	const { pLess, pGreater, pTwoSided } = testedStatistic(within, plan);
	const runs = { exact: within.exact, shuffles: plan.permutations };
	return {
		pLess,
		pGreater,
		pTwoSided,
		sides: [...within.sides],
		rootPairShare: within.rootPairShare,
		exact: within.exact,
		count: within.count,
		smallestP: Math.min(1, sides * smallestWithinP(prepared.tree, design, runs))
	};
}

function testedStatistic(outcome: NullOutcome, plan: Plan): TestedStatistic {
	const tested = outcome.statistics[plan.statistic];
	if (tested === undefined) {
		throw new InputError(
			'age-zero',
			'The slope on the logarithm of age needs every common ancestor older than 0; at least one has age 0. Choose the slope on age.'
		);
	}
	return tested;
}

function tailOf(tested: TestedStatistic, alternative: Alternative): number {
	return alternative === 'less' ? tested.pLess : alternative === 'greater' ? tested.pGreater : tested.pTwoSided;
}

function countOf(tested: TestedStatistic, alternative: Alternative): number {
	return alternative === 'less'
		? tested.less
		: alternative === 'greater'
			? tested.greater
			: Math.min(tested.less, tested.greater);
}

function interval(asExtreme: number, count: number, sides: number): [number, number] {
	const [from, to] = clopperPearson(asExtreme, count, INTERVAL_LEVEL);
	return [Math.min(1, sides * from), Math.min(1, sides * to)];
}
