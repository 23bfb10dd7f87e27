import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import type { AnalysisFailure } from './analysisStore.ts';
import { joinProgress } from './joinProgress.ts';

/** What somebody who watches an analysis is told; everything but progress is the end. */
export type AnalysisEvent =
	| { readonly type: 'progress'; readonly progress: AnalysisProgress }
	| { readonly type: 'finished' }
	| { readonly type: 'stopped' }
	| { readonly type: 'failed'; readonly failure: AnalysisFailure };

export type Mailbox = {
	readonly put: (event: AnalysisEvent) => void;
	/** the next event, or null when none came in time */
	readonly take: (timeoutMs: number) => Promise<AnalysisEvent | null>;
};

/**
 * Keeps what arrives between two takes as one event: progress is joined, an end replaces it. A slow reader therefore
 * misses no slope and holds back nobody.
 */
export function openMailbox(): Mailbox {
	let held: AnalysisEvent | null = null;
	let ring: (() => void) | null = null;
	const put = (event: AnalysisEvent) => {
		held = join(held, event);
		ring?.();
	};
	const take = async (timeoutMs: number) => {
		if (held === null) {
			await new Promise<void>((wake) => {
				const timer = setTimeout(wake, timeoutMs);
				ring = () => {
					clearTimeout(timer);
					wake();
				};
			});
			ring = null;
		}
		const event = held;
		held = null;
		return event;
	};
	return { put, take };
}

function join(held: AnalysisEvent | null, event: AnalysisEvent): AnalysisEvent {
	if (held?.type !== 'progress' || event.type !== 'progress') return event;
	return { type: 'progress', progress: joinProgress(held.progress, event.progress) };
}
