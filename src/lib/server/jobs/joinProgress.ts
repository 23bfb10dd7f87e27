import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';

/** More lines than a plate draws; older ones give way. */
const MOST_SLOPES = 240;

/** One message in place of two that follow one another: the newer numbers, and the slopes of both. */
export function joinProgress(earlier: AnalysisProgress | null, later: AnalysisProgress): AnalysisProgress {
	if (earlier === null) return later;
	return { ...later, newSlopes: [...earlier.newSlopes, ...later.newSlopes].slice(-MOST_SLOPES) };
}
