import { and, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import type { TreeSetRequest } from '#lib/contracts/materials.ts';
import { isNothingKnown, type TreeAbout } from '#lib/contracts/treeAbout.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { treeSets } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import { readTreeSet, type TreeSetFacts } from './readTreeSet.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';
import * as texts from './texts.ts';
import { treeSetFromRow, type TreeSet } from './treeSetRows.ts';

/** Newest first. */
export async function list(access: Access): Promise<TreeSet[]> {
	const rows = await db()
		.select()
		.from(treeSets)
		.where(and(within(access, treeSets.studyId), isNull(treeSets.deletedAt)))
		.orderBy(desc(treeSets.createdAt), desc(treeSets.id));
	return rows.map(treeSetFromRow);
}

/** What was deleted or replaced, the last first. */
export async function listDeleted(access: Access): Promise<TreeSet[]> {
	const rows = await db()
		.select()
		.from(treeSets)
		.where(and(within(access, treeSets.studyId), isNotNull(treeSets.deletedAt)))
		.orderBy(desc(treeSets.deletedAt));
	return rows.map(treeSetFromRow);
}

export async function find(access: Access, id: string): Promise<TreeSet | null> {
	const kept = await findKept(access, id);
	return kept?.deletedAt === null ? kept : null;
}

/** Finds deleted ones too: an analysis keeps what it ran on. */
export async function findKept(access: Access, id: string): Promise<TreeSet | null> {
	const rows = await db()
		.select()
		.from(treeSets)
		.where(and(eq(treeSets.id, id), within(access, treeSets.studyId)))
		.limit(1);
	return rows[0] === undefined ? null : treeSetFromRow(rows[0]);
}

/**
 * Reads and keeps a text of trees.
 * @throws {InputError} what the reader of trees refuses; `burn-in-too-long`
 */
export async function create(access: Access, request: TreeSetRequest): Promise<TreeSet> {
	const read = await readTreeSet(request);
	const textHash = await texts.store(request.text);
	return keep(access, request, { read, textHash, replaces: null });
}

/** Keeps a new tree set in the place of an old one, which stays for the analyses that ran on it. */
export async function replace(access: Access, id: string, request: TreeSetRequest): Promise<TreeSet | null> {
	if ((await find(access, id)) === null) return null;
	const read = await readTreeSet(request);
	const textHash = await texts.store(request.text);
	return transaction(async () => {
		await change(access, id, { deletedAt: new Date() });
		return keep(access, request, { read, textHash, replaces: id });
	});
}

type Kept = { read: TreeSetFacts; textHash: string; replaces: string | null };

function keep(access: Access, request: TreeSetRequest, { read, textHash, replaces }: Kept): Promise<TreeSet> {
	const { label, ageUnit, confirm, about } = request;
	const spreadConfirmed = confirm?.spread === true;
	const row = {
		id: newId(),
		studyId: studyOf(access),
		createdBy: personOf(access),
		label,
		ageUnit,
		spreadConfirmed,
		about: about ?? null
	};
	return transaction(async (tx) => {
		const rows = await tx
			.insert(treeSets)
			.values({ ...row, ...read, textHash, replaces })
			.returning();
		if (rows[0] === undefined) throw new Error('Expected the new tree set back from the database; got nothing.');
		await studies.touch(access);
		const action = replaces === null ? 'tree-set.added' : 'tree-set.replaced';
		await logBook.append(access, { action, detail: { treeSet: row.id, label, replaces } });
		return treeSetFromRow(rows[0]);
	});
}

export async function rename(access: Access, id: string, label: string): Promise<boolean> {
	return changeNoted(access, id, { values: { label }, action: 'tree-set.changed' });
}

/** A second one of the same text and readings, with a label of its own; null when it is not there. */
export function copy(access: Access, id: string): Promise<TreeSet | null> {
	return transaction(async (tx) => {
		const [source] = await tx
			.select()
			.from(treeSets)
			.where(and(eq(treeSets.id, id), isNull(treeSets.deletedAt), within(access, treeSets.studyId)));
		if (source === undefined) return null;
		const { createdAt: _madeThen, ...kept } = source;
		const row = { ...kept, id: newId(), label: `${source.label} (copy)`, replaces: null, createdBy: personOf(access) };
		const [copied] = await tx.insert(treeSets).values(row).returning();
		if (copied === undefined) throw new Error('Expected the copy back from the database; got nothing.');
		await studies.touch(access);
		await logBook.append(access, { action: 'tree-set.added', detail: { treeSet: row.id, label: row.label, copyOf: id } });
		return treeSetFromRow(copied);
	});
}

export async function remove(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: new Date() }, action: 'tree-set.deleted' });
}

export async function restore(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: null }, action: 'tree-set.restored' });
}

/** The person accepts that the tips be levelled by extending terminal branches. */
export async function confirmSpread(access: Access, id: string): Promise<boolean> {
	const found = await find(access, id);
	if (found === null) return false;
	const text = await texts.load(found.textHash);
	const { kind, chosen } = found;
	const read = await readTreeSet({ text, kind, ...chosen, confirm: { spread: true } });
	return changeNoted(access, id, { values: { ...read, spreadConfirmed: true }, action: 'tree-set.changed' });
}

/** What only the author of the tree knows; analyses made before become out of date, for their cautions rest on it. */
export async function describe(access: Access, id: string, about: TreeAbout): Promise<boolean> {
	return changeNoted(access, id, { values: { about: isNothingKnown(about) ? null : about }, action: 'tree-set.changed' });
}

type Values = Partial<typeof treeSets.$inferInsert>;

async function changeNoted(
	access: Access,
	id: string,
	{ values, action }: { values: Values; action: logBook.LoggedAction }
): Promise<boolean> {
	return transaction(async () => {
		if (!(await change(access, id, values))) return false;
		await studies.touch(access);
		await logBook.append(access, { action, detail: { treeSet: id } });
		return true;
	});
}

async function change(access: Access, id: string, values: Values): Promise<boolean> {
	const changed = await db()
		.update(treeSets)
		.set(values)
		.where(and(eq(treeSets.id, id), within(access, treeSets.studyId)))
		.returning({ id: treeSets.id });
	return changed.length > 0;
}
