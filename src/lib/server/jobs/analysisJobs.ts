import { setTimeout as pause } from 'node:timers/promises';
import { isInTransaction } from '#lib/server/db/client.ts';
import { runtime } from '#lib/server/heldRuntime.ts';
import { openMailbox, type AnalysisEvent } from './analysisEvents.ts';
import { storedState, type StoredState } from './heartbeat.ts';

export type { AnalysisEvent } from './analysisEvents.ts';

/** 20 messages a second are enough for the eye. */
const QUIET_MS = 50;
/** An analysis that runs in another process is seen through the database, this often. */
const LOOK_EVERY_MS = 1_000;

/**
 * Puts a waiting analysis into the queue and starts it at once if this process has a free thread.
 * Call it after the transaction that made the analysis: a job must not be seen before its row.
 */
export async function enqueueAnalysis(id: string): Promise<void> {
	if (isInTransaction()) throw new Error('Expected enqueueAnalysis after the transaction, not inside it.');
	const { queue, worker } = runtime();
	await queue.send({ analysisId: id, attempt: 1 });
	worker.wake();
}

/** Stops a waiting or working analysis and frees its thread. A run in another process ends at its next heartbeat. */
export async function stopAnalysis(id: string): Promise<void> {
	const { worker, progress } = runtime();
	await worker.stop(id);
	progress.emit(id, { type: 'stopped' } satisfies AnalysisEvent);
}

/**
 * What happens to an analysis from now on, at most 20 times a second, up to and with its end; an analysis that is over
 * already gives its end at once. The first message holds the slopes so far. An unknown id gives nothing.
 */
export async function* watchAnalysis(id: string, { signal }: { signal?: AbortSignal } = {}): AsyncGenerator<AnalysisEvent, void> {
	const { progress, worker } = runtime();
	const mailbox = openMailbox();
	const latest = worker.running.get(id)?.latest ?? null;
	if (latest !== null) mailbox.put({ type: 'progress', progress: latest });
	progress.on(id, mailbox.put);
	let done = -1;
	try {
		for (let wait = 0; signal?.aborted !== true; wait = LOOK_EVERY_MS) {
			const event = (await mailbox.take(wait)) ?? (await eventFromStore(id, done));
			if (event === 'gone') return;
			if (event === null) continue;
			yield event;
			if (event.type !== 'progress') return;
			done = event.progress.done;
			await pause(QUIET_MS);
		}
	} finally {
		progress.off(id, mailbox.put);
	}
}

/** Null when there is nothing new. */
async function eventFromStore(id: string, done: number): Promise<AnalysisEvent | 'gone' | null> {
	const stored = await storedState(id);
	if (stored === null) return 'gone';
	// The messages of a run in this process come straight from it; the stored copy is older.
	if (stored.status === 'working' && runtime().worker.running.has(id)) return null;
	return eventOf(stored, done);
}

function eventOf({ status, progress, failure }: StoredState, done: number): AnalysisEvent | null {
	if (status === 'finished' || status === 'stopped') return { type: status };
	if (status === 'failed')
		return { type: 'failed', failure: failure ?? { code: 'program-failed', message: 'The analysis failed.' } };
	if (status === 'waiting' || progress === null || progress.done === done) return null;
	return { type: 'progress', progress };
}
