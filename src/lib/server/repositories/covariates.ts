import { and, desc, eq, getTableColumns, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { CovariateRequest } from '#lib/contracts/covariates.ts';
import type { CovariateReading } from '#lib/contracts/compute.ts';
import { matrixSchema, type Confirm } from '#lib/contracts/materials.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { covariates } from '#lib/server/db/schema.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import { covariateFromRow, listedCovariate, type Covariate, type ListedCovariate } from './covariateRows.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import { bytesOf } from './overlapRunRows.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';
import * as texts from './texts.ts';

const { lower: _, ...listedColumns } = getTableColumns(covariates);

/** Newest first, without the values. */
export async function list(access: Access): Promise<ListedCovariate[]> {
	const rows = await db()
		.select(listedColumns)
		.from(covariates)
		.where(and(within(access, covariates.studyId), isNull(covariates.deletedAt)))
		.orderBy(desc(covariates.createdAt), desc(covariates.id));
	return rows.map(listedCovariate);
}

/** What was deleted or replaced, the last first, without the values. */
export async function listDeleted(access: Access): Promise<ListedCovariate[]> {
	const rows = await db()
		.select(listedColumns)
		.from(covariates)
		.where(and(within(access, covariates.studyId), isNotNull(covariates.deletedAt)))
		.orderBy(desc(covariates.deletedAt));
	return rows.map(listedCovariate);
}

export async function find(access: Access, id: string): Promise<Covariate | null> {
	const [kept] = await findKept(access, [id]);
	return kept?.deletedAt === null ? kept : null;
}

/** In the order asked; deleted ones too, since an analysis keeps what it ran on. One that is not there is left out. */
export async function findKept(access: Access, ids: readonly string[]): Promise<Covariate[]> {
	if (ids.length === 0) return [];
	const rows = await db()
		.select()
		.from(covariates)
		.where(and(inArray(covariates.id, [...ids]), within(access, covariates.studyId)));
	const found = new Map(rows.map((row) => [row.id, covariateFromRow(row)]));
	return ids.flatMap((id) => found.get(id) ?? []);
}

/**
 * The covariates of a stored plan, deleted ones too.
 * @throws {Error} when one is not there: a defect of ours
 */
export async function keptOf(access: Access, ids: readonly string[]): Promise<Covariate[]> {
	const found = await findKept(access, ids);
	if (found.length < ids.length) throw new Error(`Expected ${ids.length} covariates of a plan; ${found.length} are there.`);
	return found;
}

/** @throws {InputError} what the reader of covariates refuses */
export async function create(access: Access, request: CovariateRequest): Promise<Covariate> {
	const reading = await readRequest(request);
	const textHash = await texts.store(textOf(request));
	return keep(access, request, { reading, textHash, replaces: null });
}

/** Keeps a new covariate in the place of an old one, which stays for the analyses that ran on it. */
export async function replace(access: Access, id: string, request: CovariateRequest): Promise<Covariate | null> {
	if ((await find(access, id)) === null) return null;
	const reading = await readRequest(request);
	const textHash = await texts.store(textOf(request));
	return transaction(async () => {
		await change(access, id, { deletedAt: new Date() });
		return keep(access, request, { reading, textHash, replaces: id });
	});
}

function readRequest({ label: _label, ...given }: CovariateRequest): Promise<CovariateReading> {
	return compute('readCovariate', given);
}

/** What arrived is kept as it was: the text, or the matrix as JSON. */
function textOf({ matrix, csv, places }: CovariateRequest): string {
	return csv ?? places ?? JSON.stringify(matrix);
}

type Kept = { reading: CovariateReading; textHash: string; replaces: string | null };

function keep(access: Access, { label }: CovariateRequest, { reading, textHash, replaces }: Kept): Promise<Covariate> {
	const row = { id: newId(), studyId: studyOf(access), createdBy: personOf(access), label, textHash, replaces };
	return transaction(async (tx) => {
		const rows = await tx
			.insert(covariates)
			.values({ ...row, ...readColumns(reading) })
			.returning();
		if (rows[0] === undefined) throw new Error('Expected the new covariate back from the database; got nothing.');
		await studies.touch(access);
		const action = replaces === null ? 'covariate.added' : 'covariate.replaced';
		await logBook.append(access, { action, detail: { covariate: row.id, label, replaces } });
		return covariateFromRow(rows[0]);
	});
}

function readColumns({ species, lower, reading, remarks }: CovariateReading) {
	return { species: [...species], lower: bytesOf(lower), reading, remarks: [...remarks] };
}

/**
 * The person settles what was guessed: what arrived is read again with the answers.
 * @throws {InputError} when an answer does not fit the text
 */
export async function settle(access: Access, id: string, { kind, triangle }: Confirm): Promise<boolean> {
	const found = await find(access, id);
	if (found === null) return false;
	const text = await texts.load(found.textHash);
	const reading = await compute('readCovariate', {
		...givenOf(found, text),
		scale: found.reading.scale,
		confirm: { kind, triangle }
	});
	return changeNoted(access, id, { values: readColumns(reading), action: 'covariate.changed' });
}

function givenOf({ reading }: Covariate, text: string): Pick<CovariateRequest, 'matrix' | 'csv' | 'places'> {
	if (reading.source === 'places') return { places: text };
	// A matrix that came as JSON has no separator.
	return reading.separator === null ? { matrix: matrixSchema.parse(JSON.parse(text)) } : { csv: text };
}

export function rename(access: Access, id: string, label: string): Promise<boolean> {
	return changeNoted(access, id, { values: { label }, action: 'covariate.changed' });
}

/** A second one of the same text and readings, with a label of its own; null when it is not there. */
export function copy(access: Access, id: string): Promise<Covariate | null> {
	return transaction(async (tx) => {
		const [source] = await tx
			.select()
			.from(covariates)
			.where(and(eq(covariates.id, id), isNull(covariates.deletedAt), within(access, covariates.studyId)));
		if (source === undefined) return null;
		const { createdAt: _madeThen, ...kept } = source;
		const row = { ...kept, id: newId(), label: `${source.label} (copy)`, replaces: null, createdBy: personOf(access) };
		const [copied] = await tx.insert(covariates).values(row).returning();
		if (copied === undefined) throw new Error('Expected the copy back from the database; got nothing.');
		await studies.touch(access);
		await logBook.append(access, { action: 'covariate.added', detail: { covariate: row.id, label: row.label, copyOf: id } });
		return covariateFromRow(copied);
	});
}

export function remove(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: new Date() }, action: 'covariate.deleted' });
}

export function restore(access: Access, id: string): Promise<boolean> {
	return changeNoted(access, id, { values: { deletedAt: null }, action: 'covariate.restored' });
}

type Values = Partial<typeof covariates.$inferInsert>;

function changeNoted(
	access: Access,
	id: string,
	{ values, action }: { values: Values; action: logBook.LoggedAction }
): Promise<boolean> {
	return transaction(async () => {
		if (!(await change(access, id, values))) return false;
		await studies.touch(access);
		await logBook.append(access, { action, detail: { covariate: id } });
		return true;
	});
}

async function change(access: Access, id: string, values: Values): Promise<boolean> {
	const changed = await db()
		.update(covariates)
		.set(values)
		.where(and(eq(covariates.id, id), within(access, covariates.studyId)))
		.returning({ id: covariates.id });
	return changed.length > 0;
}
