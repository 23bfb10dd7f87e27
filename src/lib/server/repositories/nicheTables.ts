import { and, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import type { NicheTableRequest } from '#lib/contracts/nicheTables.ts';
import type { NicheTable } from '#lib/overlap/nicheTable.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { nicheTables } from '#lib/server/db/schema.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import { nicheTableFromRow, storedVariable, type KeptNicheTable } from './nicheTableRows.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';
import * as texts from './texts.ts';

/** Newest first. */
export function list(access: Access): Promise<KeptNicheTable[]> {
	return listed(access, false);
}

/** What was deleted or replaced, the last first. */
export function listDeleted(access: Access): Promise<KeptNicheTable[]> {
	return listed(access, true);
}

async function listed(access: Access, deleted: boolean): Promise<KeptNicheTable[]> {
	const rows = await db()
		.select()
		.from(nicheTables)
		.where(and(within(access, nicheTables.studyId), deleted ? isNotNull(nicheTables.deletedAt) : isNull(nicheTables.deletedAt)))
		.orderBy(desc(deleted ? nicheTables.deletedAt : nicheTables.createdAt), desc(nicheTables.id));
	return rows.map(nicheTableFromRow);
}

export async function find(access: Access, id: string): Promise<KeptNicheTable | null> {
	const kept = await findKept(access, id);
	return kept?.deletedAt === null ? kept : null;
}

/** Finds deleted ones too: an analysis keeps what it ran on. */
export async function findKept(access: Access, id: string): Promise<KeptNicheTable | null> {
	const rows = await db()
		.select()
		.from(nicheTables)
		.where(and(eq(nicheTables.id, id), within(access, nicheTables.studyId)))
		.limit(1);
	return rows[0] === undefined ? null : nicheTableFromRow(rows[0]);
}

/** @throws {InputError} what the reader of niche tables refuses */
export async function create(access: Access, request: NicheTableRequest): Promise<KeptNicheTable> {
	const reading = await compute('readNicheTable', request);
	const textHash = await texts.store(request.csv);
	return keep(access, request, { reading, textHash, replaces: null });
}

/** Keeps a new table in the place of an old one, which stays for the analyses that ran on it. */
export async function replace(access: Access, id: string, request: NicheTableRequest): Promise<KeptNicheTable | null> {
	if ((await find(access, id)) === null) return null;
	const reading = await compute('readNicheTable', request);
	const textHash = await texts.store(request.csv);
	return transaction(async () => {
		await change(access, id, { deletedAt: new Date() });
		return keep(access, request, { reading, textHash, replaces: id });
	});
}

type Kept = { reading: NicheTable; textHash: string; replaces: string | null };

function keep(access: Access, { label }: NicheTableRequest, { reading, textHash, replaces }: Kept): Promise<KeptNicheTable> {
	const row = { id: newId(), studyId: studyOf(access), createdBy: personOf(access), label, textHash, replaces };
	const { species, variables, remarks } = reading;
	return transaction(async (tx) => {
		const rows = await tx
			.insert(nicheTables)
			.values({ ...row, species: [...species], variables: variables.map(storedVariable), remarks: [...remarks] })
			.returning();
		if (rows[0] === undefined) throw new Error('Expected the new niche table back from the database; got nothing.');
		await studies.touch(access);
		const action = replaces === null ? 'niche-table.added' : 'niche-table.replaced';
		await logBook.append(access, { action, detail: { nicheTable: row.id, label, replaces } });
		return nicheTableFromRow(rows[0]);
	});
}

export function rename(access: Access, id: string, label: string): Promise<boolean> {
	return changeNoted(access, id, { values: { label }, action: 'niche-table.changed' });
}

/** A second one of the same table, with a label of its own; null when it is not there. */
export function copy(access: Access, id: string): Promise<KeptNicheTable | null> {
	return transaction(async (tx) => {
		const [source] = await tx
			.select()
			.from(nicheTables)
			.where(and(eq(nicheTables.id, id), isNull(nicheTables.deletedAt), within(access, nicheTables.studyId)));
		if (source === undefined) return null;
		const { createdAt: _madeThen, ...kept } = source;
		const row = { ...kept, id: newId(), label: `${source.label} (copy)`, replaces: null, createdBy: personOf(access) };
		const [copied] = await tx.insert(nicheTables).values(row).returning();
		if (copied === undefined) throw new Error('Expected the copy back from the database; got nothing.');
		await studies.touch(access);
		await logBook.append(access, { action: 'niche-table.added', detail: { nicheTable: row.id, label: row.label, copyOf: id } });
		return nicheTableFromRow(copied);
	});
}

export function remove(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: new Date() }, action: 'niche-table.deleted' });
}

export function restore(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: null }, action: 'niche-table.restored' });
}

type Values = Partial<typeof nicheTables.$inferInsert>;

function changeNoted(
	access: Access,
	id: string,
	{ values, action }: { values: Values; action: logBook.LoggedAction }
): Promise<boolean> {
	return transaction(async () => {
		if (!(await change(access, id, values))) return false;
		await studies.touch(access);
		await logBook.append(access, { action, detail: { nicheTable: id } });
		return true;
	});
}

async function change(access: Access, id: string, values: Values): Promise<boolean> {
	const changed = await db()
		.update(nicheTables)
		.set(values)
		.where(and(eq(nicheTables.id, id), within(access, nicheTables.studyId)))
		.returning({ id: nicheTables.id });
	return changed.length > 0;
}
