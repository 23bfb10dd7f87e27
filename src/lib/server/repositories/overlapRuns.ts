import { and, desc, eq, getTableColumns, isNotNull, isNull } from 'drizzle-orm';
import { matrixSchema, type Confirm, type OverlapRunRequest } from '#lib/contracts/materials.ts';
import type { MatrixReading } from '#lib/overlap/matrixReading.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { overlapRuns } from '#lib/server/db/schema.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import * as openings from './openings.ts';
import { bytesOf, listedRun, lowerOf, overlapRunFromRow, type ListedRun, type OverlapRun } from './overlapRunRows.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';
import * as texts from './texts.ts';

const { lower: _, ...listedColumns } = getTableColumns(overlapRuns);

/** Newest first, without the values. */
export async function list(access: Access): Promise<ListedRun[]> {
	const rows = await db()
		.select(listedColumns)
		.from(overlapRuns)
		.where(and(within(access, overlapRuns.studyId), isNull(overlapRuns.deletedAt)))
		.orderBy(desc(overlapRuns.createdAt), desc(overlapRuns.id));
	return rows.map(listedRun);
}

/** What was deleted or replaced, the last first, without the values. */
export async function listDeleted(access: Access): Promise<ListedRun[]> {
	const rows = await db()
		.select(listedColumns)
		.from(overlapRuns)
		.where(and(within(access, overlapRuns.studyId), isNotNull(overlapRuns.deletedAt)))
		.orderBy(desc(overlapRuns.deletedAt));
	return rows.map(listedRun);
}

/** A run without its values; deleted ones too. */
export async function findListed(access: Access, id: string): Promise<ListedRun | null> {
	const rows = await db()
		.select(listedColumns)
		.from(overlapRuns)
		.where(and(eq(overlapRuns.id, id), within(access, overlapRuns.studyId)))
		.limit(1);
	return rows[0] === undefined ? null : listedRun(rows[0]);
}

export async function find(access: Access, id: string): Promise<OverlapRun | null> {
	const kept = await findKept(access, id);
	return kept?.deletedAt === null ? kept : null;
}

/** Finds deleted ones too: an analysis keeps what it ran on. */
export async function findKept(access: Access, id: string): Promise<OverlapRun | null> {
	const rows = await db()
		.select()
		.from(overlapRuns)
		.where(and(eq(overlapRuns.id, id), within(access, overlapRuns.studyId)))
		.limit(1);
	return rows[0] === undefined ? null : overlapRunFromRow(rows[0]);
}

/** @throws {InputError} what the reader of matrices refuses */
export async function create(access: Access, request: OverlapRunRequest): Promise<OverlapRun> {
	const reading = await readRequest(request);
	const textHash = await texts.store(textOf(request));
	return keep(access, request, { reading, textHash, replaces: null });
}

/** Keeps a new run in the place of an old one, which stays for the analyses that ran on it. */
export async function replace(access: Access, id: string, request: OverlapRunRequest): Promise<OverlapRun | null> {
	if ((await find(access, id)) === null) return null;
	const reading = await readRequest(request);
	const textHash = await texts.store(textOf(request));
	return transaction(async () => {
		await change(access, id, { deletedAt: new Date() });
		return keep(access, request, { reading, textHash, replaces: id });
	});
}

type Given = Pick<OverlapRunRequest, 'measure' | 'confirm' | 'matrix' | 'csv'>;

function readRequest({ measure, confirm, matrix, csv }: Given): Promise<MatrixReading> {
	return compute('readMatrix', { measure, confirm, matrix, csv });
}

/** What arrived is kept as it was: the text, or the matrix as JSON. */
function textOf({ matrix, csv }: OverlapRunRequest): string {
	return csv ?? JSON.stringify(matrix);
}

type Kept = { reading: MatrixReading; textHash: string; replaces: string | null };

function keep(access: Access, request: OverlapRunRequest, { reading, textHash, replaces }: Kept): Promise<OverlapRun> {
	const { label, measure } = request;
	const row = { id: newId(), studyId: studyOf(access), createdBy: personOf(access), label, measure, textHash, replaces };
	return transaction(async (tx) => {
		const rows = await tx
			.insert(overlapRuns)
			.values({ ...row, ...readColumns(reading) })
			.returning();
		if (rows[0] === undefined) throw new Error('Expected the new overlap run back from the database; got nothing.');
		await studies.touch(access);
		const action = replaces === null ? 'overlap-run.added' : 'overlap-run.replaced';
		await logBook.append(access, { action, detail: { overlapRun: row.id, label, replaces } });
		return overlapRunFromRow(rows[0]);
	});
}

function readColumns({ matrix, remarks, shape, kind, scale, decimal, separator }: MatrixReading) {
	return {
		species: [...matrix.species],
		lower: bytesOf(lowerOf(matrix)),
		reading: { shape, kind, scale, decimal, separator },
		remarks: [...remarks]
	};
}

/**
 * The person settles what was guessed: what arrived is read again with the answers.
 * @throws {InputError} when an answer does not fit the text
 */
export async function settle(access: Access, id: string, confirm: Confirm): Promise<boolean> {
	const found = await find(access, id);
	if (found === null || found.textHash === null) return false;
	const text = await texts.load(found.textHash);
	const { measure } = found;
	// A matrix that came as JSON has no separator.
	const given = found.reading['separator'] === null ? { matrix: matrixSchema.parse(JSON.parse(text)) } : { csv: text };
	const reading = await readRequest({ ...given, measure, confirm });
	return changeNoted(access, id, { values: readColumns(reading), action: 'overlap-run.changed' });
}

export async function rename(access: Access, id: string, label: string): Promise<boolean> {
	return changeNoted(access, id, { values: { label }, action: 'overlap-run.changed' });
}

/** A second one of the same text and readings, with a label of its own; null when it is not there. */
export function copy(access: Access, id: string): Promise<OverlapRun | null> {
	return transaction(async (tx) => {
		const [source] = await tx
			.select()
			.from(overlapRuns)
			.where(and(eq(overlapRuns.id, id), isNull(overlapRuns.deletedAt), within(access, overlapRuns.studyId)));
		if (source === undefined) return null;
		const { createdAt: _madeThen, ...kept } = source;
		const row = { ...kept, id: newId(), label: `${source.label} (copy)`, replaces: null, createdBy: personOf(access) };
		const [copied] = await tx.insert(overlapRuns).values(row).returning();
		if (copied === undefined) throw new Error('Expected the copy back from the database; got nothing.');
		await studies.touch(access);
		await logBook.append(access, { action: 'overlap-run.added', detail: { overlapRun: row.id, label: row.label, copyOf: id } });
		await openings.inherit(access, row, { access, id });
		return overlapRunFromRow(copied);
	});
}

export async function remove(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: new Date() }, action: 'overlap-run.deleted' });
}

export async function restore(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: null }, action: 'overlap-run.restored' });
}

type Values = Partial<typeof overlapRuns.$inferInsert>;

function changeNoted(
	access: Access,
	id: string,
	{ values, action }: { values: Values; action: logBook.LoggedAction }
): Promise<boolean> {
	return transaction(async () => {
		if (!(await change(access, id, values))) return false;
		await studies.touch(access);
		await logBook.append(access, { action, detail: { overlapRun: id } });
		return true;
	});
}

async function change(access: Access, id: string, values: Values): Promise<boolean> {
	const changed = await db()
		.update(overlapRuns)
		.set(values)
		.where(and(eq(overlapRuns.id, id), within(access, overlapRuns.studyId)))
		.returning({ id: overlapRuns.id });
	return changed.length > 0;
}
