import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Alternative } from '#lib/contracts/plan.ts';
import type { MatrixRegressionBlock, PartialBlock } from '#lib/contracts/resultBlocks.ts';
import { commonality } from '#lib/statistics/covariates/commonality.ts';
import type { CovariateDesign } from '#lib/statistics/covariates/covariateDesign.ts';
import { covariateTest, type CovariateOutcome, type CovariateTails } from '#lib/statistics/covariates/covariateTest.ts';
import { ageScaleOf, plannedCovariates } from '../covariates/plannedCovariates.ts';
import type { BlockContext } from './blockContext.ts';

/** Products that the shuffles may cost, about half a minute of one core … */
const MOST_PRODUCTS = 2e10;
/** … but never fewer shuffles than these, which place a p of 0.05 within 0.004. */
const ENOUGH_SHUFFLES = 9999;

/** What age tells of overlap after allowing for the covariates of the plan; empty when it names none. */
export function covariatesBlock({ inputs, plan, prepared }: BlockContext): Pick<AnalysisResult, 'partial' | 'matrixRegression'> {
	const design = plannedCovariates(prepared, inputs, plan);
	if (design === null) return {};
	const outcome = covariateTest(design, { permutations: affordable(design, plan.permutations), seed: plan.seed });
	const scales = (inputs.covariates ?? []).map(({ scale }) => scale);
	return {
		partial: partialOf(outcome, plan.alternative),
		matrixRegression: { ageScale: ageScaleOf(plan), ...regressionOf(design, outcome, scales) }
	};
}

/** The first of the same shuffles where all of them would take too long. */
function affordable({ sums }: CovariateDesign, asked: number): number {
	const pairs = (sums.tipCount * (sums.tipCount - 1)) / 2;
	const most = Math.floor(MOST_PRODUCTS / (pairs * sums.fixedCount * sums.movedCount));
	return Math.min(asked, Math.max(ENOUGH_SHUFFLES, most));
}

function partialOf({ r, residual, raw, exact, count }: CovariateOutcome, alternative: Alternative): PartialBlock {
	const told = (tails: CovariateTails) => ({ p: tailOf(tails, alternative), ...tailsOf(tails) });
	return { r, ...told(residual), raw: told(raw), exact, count };
}

function regressionOf(
	design: CovariateDesign,
	outcome: CovariateOutcome,
	scales: readonly ('plain' | 'log')[]
): Omit<MatrixRegressionBlock, 'ageScale'> {
	const { age, covariates, shared } = commonality(design);
	return {
		intercept: design.intercept,
		coefficients: design.coefficients.map((coefficient, k) => {
			const tails = outcome.coefficients[k];
			if (tails === undefined) throw new Error('Every coefficient is tested.');
			return { ...coefficient, p: tails.pTwoSided, ...tailsOf(tails), scale: k === 0 ? null : (scales[k - 1] ?? 'plain') };
		}),
		rSquared: design.rSquared,
		p: outcome.pOfRSquared,
		unique: { age, ageP: outcome.pOfAgePart, covariates, shared }
	};
}

function tailOf({ pLess, pGreater, pTwoSided }: CovariateTails, alternative: Alternative): number {
	return { less: pLess, greater: pGreater, 'two-sided': pTwoSided }[alternative];
}

function tailsOf({ pLess, pGreater, pTwoSided }: CovariateTails) {
	return { pLess, pGreater, pTwoSided };
}
