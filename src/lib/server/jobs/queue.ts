import PgBoss from 'pg-boss';
import { describeError, log } from '#lib/server/log.ts';

export type ExecuteSql = (
	text: string,
	values?: readonly unknown[]
) => Promise<{ rows: Record<string, unknown>[]; rowCount: number }>;

export type AnalysisJob = {
	readonly analysisId: string;
	/** counts from 1; raised when the process of an earlier attempt died */
	readonly attempt: number;
};
export type JobQueue = {
	readonly boss: PgBoss;
	readonly send: (job: AnalysisJob) => Promise<void>;
	readonly close: () => Promise<void>;
};

export const ANALYSES = 'analyses';

/** An analysis whose process died this often under it, as for want of memory, is given up. */
export const MOST_ATTEMPTS = 3;

/** Opens the queue on the same database as everything else; its tables are made on first use. */
export async function openQueue(executeSql: ExecuteSql): Promise<JobQueue> {
	const boss = new PgBoss({
		db: { executeSql: (text: string, values: unknown[]) => executeSql(text, values) },
		// Nothing here runs by the clock.
		schedule: false
	});
	boss.on('error', (cause) => log('error', 'queue', describeError(cause)));
	await boss.start();
	await boss.createQueue(ANALYSES);
	return {
		boss,
		send: async (job) => {
			// The queue's own expiry and retries would know less than the heartbeat; its longest expiry is a day.
			await boss.send(ANALYSES, job, { retryLimit: 0, expireInHours: 23 });
		},
		close: () => boss.stop({ graceful: false, wait: true, close: false })
	};
}
