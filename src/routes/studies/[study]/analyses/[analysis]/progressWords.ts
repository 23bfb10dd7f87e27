import { formatCount, formatSlope } from '#lib/analysis/words/numbers.ts';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';

/** How far a run is, in a sentence for those who do not see the bar. */
export function progressWords({ done, total, p, monteCarloStandardError }: AnalysisProgress): string {
	const share = Math.floor((100 * done) / Math.max(1, total));
	const soFar = done === 0 ? '' : ` p so far ${formatSlope(p, 2)}, plus or minus ${formatSlope(monteCarloStandardError, 1)}.`;
	return `${share} percent: ${formatCount(done)} of ${formatCount(total)} shuffles.${soFar}`;
}
