import { sql } from 'drizzle-orm';
import { db } from '#lib/server/db/client.ts';

/** Asks the database and the queue's tables for a sign of life. */
export async function ping(): Promise<void> {
	await db().execute(sql`select 1 from pgboss.version`);
}
