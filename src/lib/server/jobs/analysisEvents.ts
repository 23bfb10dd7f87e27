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
 * Keeps what arrives between two takes as at most two events: all progress joined, then an end. A slow reader therefore
 * misses no slope and holds back nobody.
 */
export function openMailbox(): Mailbox {
	let progress: AnalysisProgress | null = null;
	let end: AnalysisEvent | null = null;
	let ring: (() => void) | null = null;
	const put = (event: AnalysisEvent) => {
		if (event.type === 'progress') progress = joinProgress(progress, event.progress);
		else end = event;
		ring?.();
	};
	const held = (): AnalysisEvent | null => {
		if (progress === null) return end;
		const event: AnalysisEvent = { type: 'progress', progress };
		progress = null;
		return event;
	};
	const take = async (timeoutMs: number) => {
		const event = held();
		if (event !== null) return event;
		await new Promise<void>((wake) => {
			const timer = setTimeout(wake, timeoutMs);
			ring = () => {
				clearTimeout(timer);
				wake();
			};
		});
		ring = null;
		return held();
	};
	return { put, take };
}
