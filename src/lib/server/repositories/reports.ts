import { and, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import { writeCaption } from '#lib/analysis/words/caption.ts';
import type { FigureSettings, ReportRequest } from '#lib/contracts/report.ts';
import { personOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { reports, users } from '#lib/server/db/schema.ts';
import * as analyses from './analyses.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';

export type Report = {
	readonly id: string;
	readonly studyId: string;
	readonly analysisId: string;
	readonly title: string;
	readonly caption: string;
	/** a person has changed the words that were written for the result */
	readonly captionEdited: boolean;
	readonly notes: string;
	readonly figure: FigureSettings;
	readonly createdBy: string;
	/** name of the person who saved it */
	readonly author: string;
	readonly createdAt: string;
	readonly changedAt: string;
};

const columns = {
	id: reports.id,
	studyId: reports.studyId,
	analysisId: reports.analysisId,
	title: reports.title,
	caption: reports.caption,
	captionEdited: reports.captionEdited,
	notes: reports.notes,
	figure: reports.figure,
	createdBy: reports.createdBy,
	author: users.name,
	createdAt: reports.createdAt,
	changedAt: reports.changedAt
};

/** Newest first; of one analysis, when it is given. */
export async function list(access: Access, { analysis }: { analysis?: string } = {}): Promise<Report[]> {
	const ofAnalysis = analysis === undefined ? undefined : eq(reports.analysisId, analysis);
	const rows = await db()
		.select(columns)
		.from(reports)
		.innerJoin(users, eq(users.id, reports.createdBy))
		.where(and(within(access, reports.studyId), isNull(reports.deletedAt), ofAnalysis))
		.orderBy(desc(reports.createdAt), desc(reports.id));
	return rows.map(fromRow);
}

/** What may be brought back, the one deleted last first. */
export async function listDeleted(access: Access): Promise<Report[]> {
	const rows = await db()
		.select(columns)
		.from(reports)
		.innerJoin(users, eq(users.id, reports.createdBy))
		.where(and(within(access, reports.studyId), isNotNull(reports.deletedAt)))
		.orderBy(desc(reports.deletedAt));
	return rows.map(fromRow);
}

export async function find(access: Access, id: string): Promise<Report | null> {
	const rows = await db()
		.select(columns)
		.from(reports)
		.innerJoin(users, eq(users.id, reports.createdBy))
		.where(and(eq(reports.id, id), within(access, reports.studyId), isNull(reports.deletedAt)))
		.limit(1);
	return rows[0] === undefined ? null : fromRow(rows[0]);
}

type Row = Omit<Report, 'createdAt' | 'changedAt'> & { createdAt: Date; changedAt: Date };

function fromRow(row: Row): Report {
	return { ...row, createdAt: row.createdAt.toISOString(), changedAt: row.changedAt.toISOString() };
}

/** Null unless the analysis is there and has finished. Without a caption, the one written for the result is kept. */
export async function create(access: Access, analysisId: string, request: ReportRequest): Promise<Report | null> {
	const analysis = await analyses.find(access, analysisId);
	if (analysis === null || analysis.result === null) return null;
	const written = writeCaption(analysis.result);
	const { title, caption = written, notes, figure } = request;
	const id = newId();
	const owner = { studyId: analysis.studyId, createdBy: personOf(access) };
	return transaction(async (tx) => {
		const words = { title, caption, captionEdited: caption !== written, notes };
		await tx.insert(reports).values({ id, ...owner, analysisId, ...words, figure });
		await studies.touch(access);
		await logBook.append(access, { action: 'report.made', detail: { report: id, analysis: analysisId, title } });
		return find(access, id);
	});
}

export type ReportChange = Partial<Pick<ReportRequest, 'title' | 'caption' | 'notes' | 'figure'>>;

export function update(access: Access, id: string, { title, caption, notes, figure }: ReportChange): Promise<boolean> {
	const words = caption === undefined ? {} : { caption, captionEdited: true };
	const values = { ...words, ...given({ title, notes, figure }), changedAt: new Date() };
	return change(access, id, { values, action: 'report.changed' });
}

function given<Value extends object>(values: Value): Partial<{ [Key in keyof Value]: NonNullable<Value[Key]> }> {
	const entries = Object.entries(values).filter(([, value]) => value !== undefined);
	// Only fields without a value were left out.
	return Object.fromEntries(entries) as Partial<{ [Key in keyof Value]: NonNullable<Value[Key]> }>;
}

export function remove(access: Access, id: string): Promise<boolean> {
	return change(access, id, { values: { deletedAt: new Date() }, action: 'report.deleted' });
}

export function restore(access: Access, id: string): Promise<boolean> {
	return change(access, id, { values: { deletedAt: null }, action: 'report.restored' });
}

type Change = { values: Partial<typeof reports.$inferInsert>; action: logBook.LoggedAction };

function change(access: Access, id: string, { values, action }: Change): Promise<boolean> {
	return transaction(async (tx) => {
		const changed = await tx
			.update(reports)
			.set(values)
			.where(and(eq(reports.id, id), within(access, reports.studyId)))
			.returning({ id: reports.id });
		if (changed.length === 0) return false;
		await studies.touch(access);
		await logBook.append(access, { action, detail: { report: id } });
		return true;
	});
}
