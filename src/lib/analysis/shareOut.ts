import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import type { ComputeProgress } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { chunksOf } from '#lib/statistics/runChunks.ts';
import type { ChunkShare } from '#lib/statistics/shuffleBatches.ts';
import { pSoFar } from './progressReporter.ts';

/** Below this a second thread costs more to begin than it saves. */
const WORTH_SHARING_S = 0.5;
/** One pair of one shuffle, both questions together; measured at 200 species on one thread, rounded up. */
const PAIR_S = 1.5e-9;

/**
 * The chunks of a plan's shuffles, dealt to so many threads in equal runs.
 *
 * @param species - at most so many are compared
 * @returns nothing where one thread is quick enough
 */
export function shareOut(plan: Plan, species: number, threads: number): readonly ChunkShare[] {
	// Reading the trees is the longer part of a test over all of them, and shares would tell the p of the drawn one.
	if (plan.tree === 'all') return [];
	const pairs = (species * (species - 1)) / 2;
	if (threads < 2 || plan.permutations * pairs * PAIR_S < WORTH_SHARING_S) return [];
	const chunks = chunksOf(plan.permutations);
	const shares = Math.min(threads, chunks);
	const start = (share: number) => Math.floor((share * chunks) / shares);
	return Array.from({ length: shares }, (_, share) => ({
		firstChunk: start(share),
		chunkCount: start(share + 1) - start(share)
	}));
}

/** What has been heard of all shares, as the progress of the one analysis: counts add up, lines are those of `latest`. */
export function joinShares(plan: Plan, heard: readonly ComputeProgress[], latest: ComputeProgress): AnalysisProgress {
	let [done, asked, less, greater] = [0, 0, 0, 0];
	for (const { done: ofShare, share } of heard) {
		done += ofShare;
		asked += share?.done ?? 0;
		less += share?.less ?? 0;
		greater += share?.greater ?? 0;
	}
	const { total, slope, meanAge, meanOverlap, newSlopes } = latest;
	const known = { total, slope, meanAge, meanOverlap, newSlopes };
	return { done, ...known, ...pSoFar(plan, { done: asked, counts: { less, greater } }) };
}
