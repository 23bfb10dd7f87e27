import { and, asc, eq, sql } from 'drizzle-orm';
import type { Role } from '#lib/contracts/user.ts';
import { labOf, personOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { labs, memberships, users } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';

export type Lab = { readonly id: string; readonly name: string; readonly isPersonal: boolean };
export type OwnMembership = Lab & { readonly role: Role };
export type Member = { readonly userId: string; readonly name: string; readonly email: string; readonly role: Role };

type NewLab = { readonly name: string; readonly lead: string; readonly isPersonal?: boolean };

export async function create({ name, lead, isPersonal = false }: NewLab): Promise<string> {
	const id = newId();
	await transaction(async (tx) => {
		await tx.insert(labs).values({ id, name, personal: isPersonal });
		await logBook.append({ userId: lead, labId: id, studyId: null }, { action: 'lab.made' });
		await join(id, lead, 'lead');
	});
	return id;
}

export async function join(lab: string, userId: string, role: Role): Promise<void> {
	await transaction(async (tx) => {
		await tx.insert(memberships).values({ labId: lab, userId, role }).onConflictDoNothing();
		await logBook.append({ userId, labId: lab, studyId: null }, { action: 'member.added', detail: { member: userId, role } });
	});
}

/** The labs a person belongs to, their own first. */
export async function ofPerson(access: Access): Promise<OwnMembership[]> {
	return db()
		.select({ id: labs.id, name: labs.name, isPersonal: labs.personal, role: memberships.role })
		.from(memberships)
		.innerJoin(labs, eq(labs.id, memberships.labId))
		.where(eq(memberships.userId, personOf(access)))
		.orderBy(sql`${labs.personal} desc`, asc(labs.name));
}

export async function find(access: Access): Promise<Lab | null> {
	const [row] = await db()
		.select({ id: labs.id, name: labs.name, isPersonal: labs.personal })
		.from(labs)
		.where(eq(labs.id, labOf(access)));
	return row ?? null;
}

export async function members(access: Access): Promise<Member[]> {
	return db()
		.select({ userId: users.id, name: users.name, email: users.email, role: memberships.role })
		.from(memberships)
		.innerJoin(users, eq(users.id, memberships.userId))
		.where(eq(memberships.labId, labOf(access)))
		.orderBy(asc(users.name));
}

/** A lab by its name, for the demo's seed. */
export async function findByName(name: string): Promise<string | null> {
	const [row] = await db()
		.select({ id: labs.id })
		.from(labs)
		.where(and(eq(labs.name, name), eq(labs.personal, false)));
	return row?.id ?? null;
}
