import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { createHash, randomBytes } from 'node:crypto';
import { personOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { tokens } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';

export type Token = { readonly id: string; readonly label: string; readonly createdAt: Date; readonly lastUsedAt: Date | null };

/** Makes a token findable in a repository or log by whoever looks for lost ones. */
const PREFIX = 'kithline_';
const TOKEN_BYTES = 32;

/** Makes a token and returns its text, which is kept nowhere: only its hash is. */
export async function create(access: Access, label: string): Promise<string> {
	const text = PREFIX + randomBytes(TOKEN_BYTES).toString('base64url');
	await transaction(async (tx) => {
		await tx.insert(tokens).values({ id: newId(), userId: personOf(access), label, hash: hashToken(text) });
		await logBook.append(access, { action: 'token.made', detail: { label } });
	});
	return text;
}

export async function list(access: Access): Promise<Token[]> {
	return db()
		.select({ id: tokens.id, label: tokens.label, createdAt: tokens.createdAt, lastUsedAt: tokens.lastUsedAt })
		.from(tokens)
		.where(and(eq(tokens.userId, personOf(access)), isNull(tokens.revokedAt)))
		.orderBy(desc(tokens.createdAt));
}

/** False when there is no such token, or it is somebody else's. */
export async function revoke(access: Access, id: string): Promise<boolean> {
	return transaction(async (tx) => {
		const rows = await tx
			.update(tokens)
			.set({ revokedAt: new Date() })
			.where(and(eq(tokens.id, id), eq(tokens.userId, personOf(access)), isNull(tokens.revokedAt)))
			.returning({ label: tokens.label });
		const [revoked] = rows;
		if (revoked !== undefined) await logBook.append(access, { action: 'token.revoked', detail: { label: revoked.label } });
		return revoked !== undefined;
	});
}

/** Whose token this is; null when there is none or it was revoked. Its last use is kept to the minute. */
export async function holderOf(text: string): Promise<string | null> {
	const isThisToken = and(eq(tokens.hash, hashToken(text)), isNull(tokens.revokedAt));
	const [row] = await db().select({ userId: tokens.userId }).from(tokens).where(isThisToken);
	if (row === undefined) return null;
	const isOld = sql`coalesce(${tokens.lastUsedAt}, '-infinity') < now() - interval '1 minute'`;
	await db().update(tokens).set({ lastUsedAt: new Date() }).where(and(isThisToken, isOld));
	return row.userId;
}

/** A random text of 256 bits needs no slow hash. */
function hashToken(text: string): string {
	return createHash('sha256').update(text).digest('hex');
}
