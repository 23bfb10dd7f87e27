import { join } from 'node:path';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import type { AnalysisStore } from '#lib/server/jobs/analysisStore.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';

export const SLOW_COMPUTE = join(import.meta.dirname, 'slowCompute.mjs');

/** The real repository, but for the inputs: so many steps for a thread that does nothing. `treeText` steers its end. */
export function slowStore(steps: number, treeText = ''): AnalysisStore {
	const inputs: AnalysisInputs = {
		treeText,
		ageUnit: 'Ma',
		spreadConfirmed: false,
		measure: 'schoener-d',
		overlap: { species: [], lower: new Float64Array(0), remarks: [] },
		decisions: []
	};
	const plan = planSchema.parse({ treeSet: 't', overlapRun: 'o', tree: 0, seed: 1, permutations: steps });
	return { ...analyses, inputsOf: async () => ({ inputs, plan }) };
}
