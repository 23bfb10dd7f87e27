import { eq, lt, sql } from 'drizzle-orm';
import { db } from '#lib/server/db/client.ts';
import { attempts } from '#lib/server/db/schema.ts';

/** So many attempts without a wait; each one more doubles the wait, up to the longest. Forgotten after a quiet time. */
export type DelayRule = {
	readonly freeCount: number;
	readonly firstDelaySeconds: number;
	readonly longestDelaySeconds: number;
	readonly forgetAfterSeconds: number;
};

/**
 * Counts an attempt if it may be made now. The check and the count are one statement, so a hundred attempts at once
 * are not a hundred free ones.
 *
 * @returns null when the attempt may be made; else the seconds to wait
 */
export async function take(key: string, rule: DelayRule, now: Date): Promise<number | null> {
	const isForgotten = sql`${attempts.windowStart} <= ${secondsBefore(now, rule.forgetAfterSeconds)}::timestamptz`;
	const taken = await db()
		.insert(attempts)
		.values({ key, count: 1, windowStart: now })
		.onConflictDoUpdate({
			target: attempts.key,
			set: { count: sql`case when ${isForgotten} then 1 else ${attempts.count} + 1 end`, windowStart: now },
			setWhere: sql`${isForgotten} or ${attempts.windowStart} + make_interval(secs => ${delayAfter(rule)}) <= ${now.toISOString()}::timestamptz`
		})
		.returning({ count: attempts.count });
	return taken.length > 0 ? null : secondsToWait(key, rule, now);
}

/** The attempts under this key came to a good end. */
export async function forget(key: string): Promise<void> {
	await db().delete(attempts).where(eq(attempts.key, key));
}

/** Deletes counts that no rule remembers any more. */
export async function sweep(before: Date): Promise<void> {
	await db().delete(attempts).where(lt(attempts.windowStart, before));
}

async function secondsToWait(key: string, rule: DelayRule, now: Date): Promise<number> {
	const [row] = await db()
		.select({
			wait: sql<number>`extract(epoch from ${attempts.windowStart} - ${now.toISOString()}::timestamptz)::float8 + ${delayAfter(rule)}`
		})
		.from(attempts)
		.where(eq(attempts.key, key));
	return Math.max(1, Math.ceil(row?.wait ?? 1));
}

/** Seconds to wait after the counted attempts: 0 while they are free, then first × 2^(count − free), at most the longest. */
function delayAfter({ freeCount, firstDelaySeconds, longestDelaySeconds }: DelayRule) {
	const doublings = sql`least(${attempts.count} - ${freeCount}::integer, 30)`;
	return sql`(case when ${attempts.count} < ${freeCount}::integer then 0
		else least(${longestDelaySeconds}::float8, ${firstDelaySeconds}::float8 * power(2, ${doublings})) end)::float8`;
}

function secondsBefore(now: Date, seconds: number): string {
	return new Date(now.getTime() - seconds * 1000).toISOString();
}
