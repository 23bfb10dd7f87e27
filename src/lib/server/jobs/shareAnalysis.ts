import { joinShares, shareOut } from '#lib/analysis/shareOut.ts';
import type { AnalysisProgress, AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs, ComputeProgress } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { runtime } from '#lib/server/heldRuntime.ts';
import { compute } from './pool.ts';

type Analysis = { readonly inputs: AnalysisInputs; readonly plan: Plan };
type Watching = { readonly onProgress: (progress: AnalysisProgress) => void; readonly signal: AbortSignal };

/**
 * Runs an analysis on the compute threads: a long one shares its shuffles among all of them and is put together on one.
 * The result does not depend on the number of threads. Whatever ends one share ends them all.
 *
 * @throws as `compute`
 */
export async function shareAnalysis({ inputs, plan }: Analysis, { onProgress, signal }: Watching): Promise<AnalysisResult> {
	const shares = shareOut(plan, inputs.overlap.species.length, runtime().pool.threads);
	if (shares.length === 0) return compute('analyse', { inputs, plan }, { onProgress, signal });

	const heard = new Map<number, ComputeProgress>();
	const failed = new AbortController();
	const either = AbortSignal.any([signal, failed.signal]);
	const run = async (share: (typeof shares)[number]) => {
		const hear = (progress: ComputeProgress) => {
			heard.set(share.firstChunk, progress);
			onProgress(joinShares(plan, [...heard.values()], progress));
		};
		try {
			return await compute('analyseShare', { inputs, plan, share }, { onProgress: hear, signal: either });
		} catch (thrown) {
			failed.abort();
			throw thrown;
		}
	};
	const outcomes = await Promise.allSettled(shares.map(run));
	// The first to fail ends the others, so its reason is the one that was not an end from outside.
	const refused = outcomes.flatMap((outcome) => (outcome.status === 'rejected' ? [outcome.reason as unknown] : []));
	const reason = refused.find((thrown) => !(thrown instanceof Error && thrown.name === 'AbortError')) ?? refused[0];
	if (reason !== undefined) throw reason;
	const tallies = outcomes.flatMap((outcome) => (outcome.status === 'fulfilled' ? [outcome.value] : []));
	return compute('analyse', { inputs, plan, shares: tallies }, { onProgress, signal });
}
