import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { PermutationDesign } from '#lib/statistics/permutationDesign.ts';
import type { PermutationOutcome } from '#lib/statistics/permutationTest.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';

/** What every block of a result is made from: the materials made to agree, and the test that has just been run. */
export type BlockContext = {
	readonly inputs: AnalysisInputs;
	readonly plan: Plan;
	readonly prepared: PreparedAnalysis;
	readonly design: PermutationDesign;
	readonly outcome: PermutationOutcome;
	readonly regression: AnalysisResult['regression'];
	/** shape (n, n), row-major, tree order */
	readonly pairAges: Float64Array;
	/** strict lower triangles, row by row, tree order */
	readonly lower: { readonly ages: Float64Array; readonly overlaps: Float64Array };
};
