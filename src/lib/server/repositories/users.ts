import { eq, sql } from 'drizzle-orm';
import type { SignedInUser } from '#lib/contracts/user.ts';
import { personOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { users } from '#lib/server/db/schema.ts';
import { isUniqueViolation } from './driverErrors.ts';
import * as labs from './labs.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';

/** A person's own view of their account. */
export type Profile = { readonly id: string; readonly email: string; readonly name: string; readonly createdAt: Date };

/** What sign-in compares. */
export type Credentials = { readonly id: string; readonly passphraseHash: string };

export type NewUser = {
	readonly email: string;
	readonly name: string;
	readonly passphraseHash: string;
	readonly isDemo?: boolean;
	/** a lab to join in this role as well as the person's own */
	readonly joins?: { readonly lab: string; readonly role: 'reader' | 'analyst' | 'lead' };
};

/** Makes an account and the person's own lab; null when the address has an account already. */
export async function register({ email, name, passphraseHash, isDemo = false, joins }: NewUser): Promise<string | null> {
	const id = newId();
	try {
		await transaction(async (tx) => {
			await tx.insert(users).values({ id, email, name, passphraseHash, isDemo });
			await labs.create({ name: `${name}'s lab`, lead: id, isPersonal: true });
			if (joins !== undefined) await labs.join(joins.lab, id, joins.role);
			await logBook.append({ userId: id, labId: null, studyId: null }, { action: 'account.registered' });
		});
		return id;
	} catch (cause) {
		if (isUniqueViolation(cause, 'users_email')) return null;
		throw cause;
	}
}

/** By address, whatever its capitals. The one query before anybody is signed in. */
export async function credentialsOf(email: string): Promise<Credentials | null> {
	const [row] = await db()
		.select({ id: users.id, passphraseHash: users.passphraseHash })
		.from(users)
		.where(eq(sql`lower(${users.email})`, email.toLowerCase()));
	return row ?? null;
}

export type SessionHolder = { readonly user: SignedInUser; readonly sessionVersion: number };

/** The person behind a session or token, as they are now; null when the account is gone. */
export async function sessionHolder(id: string): Promise<SessionHolder | null> {
	const [row] = await db()
		.select({
			id: users.id,
			email: users.email,
			name: users.name,
			sessionVersion: users.sessionVersion,
			ownLab: labOfTheirOwn
		})
		.from(users)
		.where(eq(users.id, id));
	if (row === undefined || row.ownLab === null) return null;
	const { sessionVersion, ownLab, ...person } = row;
	return { user: { ...person, ownLab }, sessionVersion };
}

export async function profile(access: Access): Promise<Profile | null> {
	const [row] = await db()
		.select({ id: users.id, email: users.email, name: users.name, createdAt: users.createdAt })
		.from(users)
		.where(eq(users.id, personOf(access)));
	return row ?? null;
}

export async function passphraseHashOf(access: Access): Promise<string | null> {
	const [row] = await db()
		.select({ hash: users.passphraseHash })
		.from(users)
		.where(eq(users.id, personOf(access)));
	return row?.hash ?? null;
}

export async function rename(access: Access, name: string): Promise<void> {
	await transaction(async (tx) => {
		await tx
			.update(users)
			.set({ name })
			.where(eq(users.id, personOf(access)));
		await logBook.append(access, { action: 'account.renamed' });
	});
}

/** Keeps the new passphrase and ends every session, also the one that asks. */
export async function changePassphrase(access: Access, passphraseHash: string): Promise<void> {
	await transaction(async (tx) => {
		await tx
			.update(users)
			.set({ passphraseHash, sessionVersion: nextVersion })
			.where(eq(users.id, personOf(access)));
		await logBook.append(access, { action: 'account.passphrase-changed' });
	});
}

export async function endSessions(access: Access): Promise<void> {
	await transaction(async (tx) => {
		await tx
			.update(users)
			.set({ sessionVersion: nextVersion })
			.where(eq(users.id, personOf(access)));
		await logBook.append(access, { action: 'account.signed-out-everywhere' });
	});
}

/** By the command line, for whoever holds the data folder; false when nobody has this address. */
export async function resetPassphrase(email: string, passphraseHash: string): Promise<boolean> {
	const known = await credentialsOf(email);
	if (known === null) return false;
	await transaction(async (tx) => {
		await tx.update(users).set({ passphraseHash, sessionVersion: nextVersion }).where(eq(users.id, known.id));
		await logBook.append({ userId: known.id, labId: null, studyId: null }, { action: 'account.passphrase-reset' });
	});
	return true;
}

export async function hasDemoAccounts(): Promise<boolean> {
	const rows = await db().select({ id: users.id }).from(users).where(eq(users.isDemo, true)).limit(1);
	return rows.length > 0;
}

const nextVersion = sql`${users.sessionVersion} + 1`;

/** The lab made at registration, else the one joined first. The column is named in full: the inner tables have an id as well. */
const labOfTheirOwn = sql<string | null>`(select m.lab_id from memberships m join labs l on l.id = m.lab_id
	where m.user_id = "users"."id" order by l.personal desc, m.created_at limit 1)`;
