import PgBoss from 'pg-boss';
import { describeError, log } from '#lib/server/log.ts';

export type ExecuteSql = (
	text: string,
	values?: readonly unknown[]
) => Promise<{ rows: Record<string, unknown>[]; rowCount: number }>;

export type JobQueue = { readonly boss: PgBoss; readonly close: () => Promise<void> };

export const ANALYSES = 'analyses';

/** An analysis whose process died this often under it, as for want of memory, is given up. */
export const MOST_ATTEMPTS = 3;

/** Opens the queue on the same database as everything else; its tables are made on first use. */
export async function openQueue(executeSql: ExecuteSql): Promise<JobQueue> {
	const boss = new PgBoss({
		db: { executeSql: (text: string, values: unknown[]) => executeSql(text, values) },
		// Nothing here runs by the clock; expiry of long analyses is told by their heartbeat.
		schedule: false
	});
	boss.on('error', (cause) => log('error', 'queue', describeError(cause)));
	await boss.start();
	await boss.createQueue(ANALYSES, { name: ANALYSES, policy: 'standard', retryLimit: 0, expireInHours: 23 });
	return { boss, close: () => boss.stop({ graceful: false, wait: true, close: false }) };
}
