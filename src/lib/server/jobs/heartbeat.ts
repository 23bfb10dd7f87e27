import { and, eq, sql } from 'drizzle-orm';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import type { AnalysisStatus } from '#lib/contracts/materials.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses } from '#lib/server/db/schema.ts';
import type { AnalysisFailure } from './analysisStore.ts';
import { ANALYSES } from './queue.ts';

/** How often the process that works on an analysis says that it still lives. */
export const BEAT_MS = 5_000;
/** Nine beats missed: its process is gone, not merely busy. */
export const STALE_AFTER_MS = 9 * BEAT_MS;
/** How often a process looks for analyses whose holder is gone; a lost one waits at most this long after `STALE_AFTER_MS`. */
export const REAP_EVERY_MS = 4 * BEAT_MS;

const isWorking = (id: string) => and(eq(analyses.id, id), eq(analyses.status, 'working'));

/** Says that the analysis is still being worked on; false when it was stopped from outside. */
export async function beat(id: string): Promise<boolean> {
	const rows = await db().update(analyses).set({ heartbeatAt: new Date() }).where(isWorking(id)).returning({ id: analyses.id });
	return rows.length > 0;
}

/** Gives an interrupted analysis back, to be run again from the start. False when it was not working any more. */
export async function returnToWaiting(id: string): Promise<boolean> {
	const fresh = { status: 'waiting', heartbeatAt: null, startedAt: null, progress: null } as const;
	const rows = await db().update(analyses).set(fresh).where(isWorking(id)).returning({ id: analyses.id });
	return rows.length > 0;
}

/** Analyses marked as working whose holder has not been heard of for so long; all of them with 0. */
export async function silentFor(silentMs: number): Promise<string[]> {
	const rows = await db()
		.select({ id: analyses.id })
		.from(analyses)
		.where(
			and(
				eq(analyses.status, 'working'),
				sql`coalesce(${analyses.heartbeatAt}, ${analyses.createdAt}) <= now() - make_interval(secs => ${silentMs / 1000})`
			)
		);
	return rows.map((row) => row.id);
}

/** Analyses that wait without a job in the queue, as after a crash between the two. */
export async function waitingWithoutJob(olderThanMs: number): Promise<string[]> {
	const rows = await db()
		.select({ id: analyses.id })
		.from(analyses)
		.where(
			and(
				eq(analyses.status, 'waiting'),
				sql`${analyses.createdAt} <= now() - make_interval(secs => ${olderThanMs / 1000})`,
				sql`not exists (select 1 from pgboss.job where name = ${ANALYSES} and state < 'completed' and data->>'analysisId' = ${analyses.id})`
			)
		);
	return rows.map((row) => row.id);
}

/** How often the analysis was begun so far, by the jobs that still stand as active for it; these are closed. */
export async function closeLostJobs(id: string): Promise<number> {
	const { rows } = await db().execute<{ attempt: number }>(sql`
		update pgboss.job set state = 'failed', completed_on = now()
		where name = ${ANALYSES} and state = 'active' and data->>'analysisId' = ${id}
		returning coalesce((data->>'attempt')::integer, 1) as attempt`);
	return Math.max(1, ...rows.map((row) => row.attempt));
}

export type StoredState = {
	readonly status: AnalysisStatus;
	readonly progress: AnalysisProgress | null;
	readonly failure: AnalysisFailure | null;
};

export async function storedState(id: string): Promise<StoredState | null> {
	const [row] = await db()
		.select({ status: analyses.status, progress: analyses.progress, failure: analyses.failure })
		.from(analyses)
		.where(eq(analyses.id, id));
	return row ?? null;
}
