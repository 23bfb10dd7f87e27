import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AlsoTested } from '#lib/contracts/resultBlocks.ts';
import type { Alternative, Plan, Statistic } from '#lib/contracts/plan.ts';
import { minimumP, type SharedNull } from '#lib/statistics/multiplicity/minimumP.ts';
import type { Functional } from '#lib/statistics/functionals.ts';
import type { TailProbabilities } from '#lib/statistics/permutationPValue.ts';
import type { PermutationOutcome } from '#lib/statistics/permutationTest.ts';

/** The plan's statistic first, then the others that it declared, each once. */
export function declaredStatistics({ statistic, alsoTest }: Pick<Plan, 'statistic' | 'alsoTest'>): readonly Statistic[] {
	return [...new Set([statistic, ...alsoTest])];
}

/**
 * The statistics tested beside the plan's own, with every p adjusted for their number under the shuffles they share.
 * Single step: all of them test one null, so there is nothing to step down to once it is rejected.
 *
 * @returns nothing when the plan declares a single statistic
 */
export function alsoTested(
	design: Counted,
	outcome: PermutationOutcome,
	plan: Plan
): Pick<AnalysisResult['permutation'], 'pAdjusted' | 'also'> {
	const declared = declaredStatistics(plan);
	if (declared.length === 1) return {};
	const nulls = declared.map((statistic) => sharedNull(design, outcome, statistic));
	const { adjusted } = minimumP(nulls, { tail: plan.alternative, exact: outcome.free.exact });
	const [main, ...others] = declared.map((statistic, k) =>
		rowOf(outcome, statistic, { plan, pAdjusted: adjusted[k]?.pSingleStep ?? 1 })
	);
	return main === undefined ? {} : { pAdjusted: main.pAdjusted, also: others };
}

/** A design, or what a test over all trees has counted. */
type Counted = { readonly functionals: readonly Pick<Functional, 'statistic' | 'observed' | 'tie'>[] };

function sharedNull({ functionals }: Counted, { free }: PermutationOutcome, statistic: Statistic): SharedNull {
	const functional = functionals.find((each) => each.statistic === statistic);
	const values = free.values[statistic];
	if (functional === undefined || values === undefined) throw new Error(`The shuffles of ${statistic} were not kept.`);
	return { observed: functional.observed, values, tie: functional.tie };
}

type Row = { readonly plan: Plan; readonly pAdjusted: number };

function rowOf({ free, within }: PermutationOutcome, statistic: Statistic, { plan, pAdjusted }: Row): AlsoTested {
	const tested = free.statistics[statistic];
	if (tested === undefined) throw new Error(`${statistic} was not tested.`);
	const inside = within?.statistics[statistic];
	const p = tailOf(tested, plan.alternative);
	return {
		statistic,
		observed: tested.observed,
		p,
		...tailsOf(tested),
		// Kept values are rounded where they are counted; an adjustment never helps.
		pAdjusted: Math.max(p, pAdjusted),
		withinDeepestSplit: within === null || inside === undefined ? null : { ...tailsOf(inside), exact: within.exact }
	};
}

function tailsOf({ pLess, pGreater, pTwoSided }: TailProbabilities): TailProbabilities {
	return { pLess, pGreater, pTwoSided };
}

function tailOf({ pLess, pGreater, pTwoSided }: TailProbabilities, alternative: Alternative): number {
	return { less: pLess, greater: pGreater, 'two-sided': pTwoSided }[alternative];
}
