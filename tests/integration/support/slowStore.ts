import { join } from 'node:path';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import type { AnalysisStore } from '#lib/server/jobs/analysisStore.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';

export const SLOW_COMPUTE = join(import.meta.dirname, 'slowCompute.mjs');

/** What the thread that does nothing is to do: so many steps; `refuse` and `break` end it otherwise. May change on the way. */
export type Script = { steps: number; text: string };

/** The real repository, but for the inputs. */
export function slowStore(script: Script): AnalysisStore {
	const inputsOf: AnalysisStore['inputsOf'] = async () => {
		const inputs: AnalysisInputs = {
			treeText: script.text,
			ageUnit: 'Ma',
			spreadConfirmed: false,
			measure: 'schoener-d',
			overlap: { species: [], lower: new Float64Array(0), remarks: [] },
			decisions: []
		};
		const plan = planSchema.parse({ treeSet: 't', overlapRun: 'o', tree: 0, seed: 1, permutations: script.steps });
		return { inputs, plan };
	};
	return { ...analyses, inputsOf };
}
