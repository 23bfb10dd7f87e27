import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { planSchema, type Plan } from '#lib/contracts/plan.ts';
import { analyse } from './analyse.ts';

/** Four species worked by hand: ages AB 1, ABC 2, root 4; D of AB, AC, BC, AD, BD, CD. */
export const MICRO_INPUTS: AnalysisInputs = {
	treeText: '(((A:1,B:1):1,C:2):2,D:4);',
	ageUnit: 'Ma',
	spreadConfirmed: false,
	measure: 'schoener-d',
	overlap: { species: ['A', 'B', 'C', 'D'], lower: Float64Array.of(0.8, 0.7, 0.6, 0.4, 0.4, 0.5), remarks: [] },
	decisions: []
};

export function microPlan(change: Partial<Plan> = {}): Plan {
	return planSchema.parse({ treeSet: 't', tree: 0, overlapRun: 'o', seed: 1, ...change });
}

export function microResult(change: Partial<Plan> = {}): AnalysisResult {
	return analyse(MICRO_INPUTS, microPlan(change));
}
