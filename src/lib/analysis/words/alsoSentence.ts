import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { formatCount, formatP } from './numbers.ts';
import { STATISTIC_WORDS } from './statisticWords.ts';

type Told = Pick<AnalysisResult, 'permutation' | 'compared'> & { readonly power?: AnalysisResult['power'] };

/** The plan's statistic after the further ones are charged for; null where a plan declared a single one. */
export function alsoSentence({ permutation, compared }: Told): string | null {
	const { also, pAdjusted, statistic } = permutation;
	if (also === undefined || pAdjusted === undefined) return null;
	const floor = floorOf({ permutation, compared });
	const count = also.length + 1;
	const within = also.filter((row) => row.pAdjusted <= compared.alpha).length + (pAdjusted <= compared.alpha ? 1 : 0);
	return (
		`${formatCount(count)} statistics were declared and judged by the same shuffles. Adjusted for their number, ` +
		`the ${STATISTIC_WORDS[statistic].name} has p ${formatP(pAdjusted, floor)}, and ` +
		`${within === 0 ? 'none' : within === count ? 'each' : formatCount(within)} of the ${formatCount(count)} is within the level of ${compared.alpha}.`
	);
}

/** Which statistic finds most on this tree, by the power that was simulated for it; null where none was. */
export function powerAdvice({ power, permutation }: Told): string | null {
	if (power === undefined) return null;
	const name = STATISTIC_WORDS[power.recommended].name;
	const most = `Of the statistics offered, this tree gives most power, by simulation, to the ${name}`;
	return power.recommended === permutation.statistic ? `${most}.` : `${most}: a choice for the next plan, not for these data.`;
}

export const ALSO_CAUTION =
	'The finding rests on the statistic that the plan is judged by. The others tell whether it hangs on that choice; they are not further evidence, being made of the same pairs.';

/** The smallest p that the test can print; null when exact. */
export function floorOf({ permutation, compared }: Told): number | null {
	const sides = compared.alternative === 'two-sided' ? 2 : 1;
	return permutation.exact ? null : sides / (permutation.count + 1);
}
