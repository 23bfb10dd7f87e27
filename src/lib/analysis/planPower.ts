import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { PowerBlock } from '#lib/contracts/resultBlocks.ts';
import { powerOf } from './powerOf.ts';
import { prepareAnalysis } from './prepareAnalysis.ts';
import { simulatedSpecies } from './simulatedSpecies.ts';

/** One seed for every plan, so that the same tree is told the same on each visit. */
const SEED = 1;

/**
 * What a plan could detect on its tree, before it runs: half as many walks as a result has. The overlaps have no part in it.
 * @throws {InputError} as `prepareAnalysis`
 */
export function planPower(inputs: AnalysisInputs, plan: Plan): PowerBlock | null {
	return powerOf(simulatedSpecies(prepareAnalysis(inputs, plan)), { ...plan, seed: SEED }, { simulations: 100 });
}
