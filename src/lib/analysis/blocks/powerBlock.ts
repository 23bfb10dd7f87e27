import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { powerOf } from '../powerOf.ts';
import { simulatedSpecies } from '../simulatedSpecies.ts';
import type { BlockContext } from './blockContext.ts';

/** What this design could have detected; absent where alpha is too small for simulations to reach. */
export function powerBlock({ plan, prepared }: BlockContext): Pick<AnalysisResult, 'power'> {
	const power = powerOf(simulatedSpecies(prepared), plan);
	return power === null ? {} : { power };
}
