import { and, asc, desc, eq, gt, sql } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import { studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { logEntries } from '#lib/server/db/schema.ts';

/** Everything the log book records. A new kind of event gets its word here first. */
export const LOGGED_ACTIONS = [
	'account.registered',
	'account.renamed',
	'account.passphrase-changed',
	'account.passphrase-reset',
	'account.signed-in',
	'account.sign-in-refused',
	'account.signed-out',
	'account.signed-out-everywhere',
	'access.refused',
	'token.made',
	'token.revoked',
	'lab.made',
	'member.added',
	'member.role-changed',
	'member.removed',
	'study.made',
	'study.changed',
	'study.copied',
	'study.deleted',
	'study.restored',
	'tree-set.added',
	'tree-set.changed',
	'tree-set.replaced',
	'tree-set.deleted',
	'tree-set.restored',
	'overlap-run.added',
	'overlap-run.changed',
	'overlap-run.replaced',
	'overlap-run.deleted',
	'overlap-run.restored',
	'overlap-run.opened',
	'covariate.added',
	'covariate.changed',
	'covariate.replaced',
	'covariate.deleted',
	'covariate.restored',
	'niche-table.added',
	'niche-table.changed',
	'niche-table.replaced',
	'niche-table.deleted',
	'niche-table.restored',
	'name.decided',
	'name.withdrawn',
	'analysis.declared',
	'analysis.asked-for',
	'analysis.started',
	'analysis.finished',
	'analysis.stopped',
	'analysis.failed',
	'analysis.deleted',
	'analysis.restored',
	'report.made',
	'report.changed',
	'report.deleted',
	'report.restored',
	'report.signed-off',
	'report.unlocked',
	'exported'
] as const;
export type LoggedAction = (typeof LOGGED_ACTIONS)[number];

export type LogPlace = Pick<Access, 'userId' | 'labId' | 'studyId'>;
export type LogDetail = Readonly<Record<string, unknown>>;
export type LogEntry = { readonly action: LoggedAction; readonly detail?: LogDetail };

/** An entry as it is read back. */
export type LoggedEntry = LogPlace & {
	readonly id: number;
	readonly at: Date;
	readonly action: string;
	readonly detail: LogDetail;
	readonly previousHash: string;
	readonly hash: string;
};

/** Previous hash of the very first entry. */
const BEGINNING = '0'.repeat(64);
/** Any fixed number: the lock that makes entries follow one another on a server with many processes. */
const CHAIN_LOCK = 7_160_411;

/**
 * Adds one line to the log book, chained to the line before by its hash. Never put a secret in `detail`: no
 * passphrase, no token, no content. Called inside a transaction, the line is kept only if the change is.
 */
export async function append(place: LogPlace, { action, detail = {} }: LogEntry): Promise<void> {
	await transaction(async (tx) => {
		await tx.execute(sql`select pg_advisory_xact_lock(${CHAIN_LOCK})`);
		const [last] = await tx.select({ hash: logEntries.hash }).from(logEntries).orderBy(desc(logEntries.id)).limit(1);
		const entry = {
			at: new Date(),
			userId: place.userId,
			labId: place.labId,
			studyId: place.studyId,
			action,
			detail: { ...detail },
			previousHash: last?.hash ?? BEGINNING
		};
		await tx.insert(logEntries).values({ ...entry, hash: entryHash(entry) });
	});
}

export function ofStudy(access: Access, limit = 200): Promise<LoggedEntry[]> {
	return db()
		.select()
		.from(logEntries)
		.where(eq(logEntries.studyId, studyOf(access)))
		.orderBy(desc(logEntries.id))
		.limit(limit);
}

/** Walks the whole chain; the id of the first entry that does not follow from the one before, or null. */
export async function firstBrokenEntry(): Promise<number | null> {
	let previousHash = BEGINNING;
	let after = 0;
	for (;;) {
		const page = await db()
			.select()
			.from(logEntries)
			.where(and(gt(logEntries.id, after)))
			.orderBy(asc(logEntries.id))
			.limit(1000);
		for (const entry of page) {
			if (entry.previousHash !== previousHash || entry.hash !== entryHash(entry)) return entry.id;
			previousHash = entry.hash;
			after = entry.id;
		}
		if (page.length === 0) return null;
	}
}

type Hashed = Omit<LoggedEntry, 'id' | 'hash'>;

function entryHash({ at, userId, labId, studyId, action, detail, previousHash }: Hashed): string {
	const line = JSON.stringify([previousHash, at.toISOString(), userId, labId, studyId, action, sortKeys(detail)]);
	return createHash('sha256').update(line).digest('hex');
}

/** The database keeps JSON objects with its own order of keys, so the hash must not depend on it. */
function sortKeys(value: unknown): unknown {
	if (Array.isArray(value)) return value.map(sortKeys);
	if (value === null || typeof value !== 'object') return value;
	const entries = Object.entries(value).filter(([, held]) => held !== undefined);
	return Object.fromEntries(entries.sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, held]) => [key, sortKeys(held)]));
}
