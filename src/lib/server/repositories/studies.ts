import { and, desc, eq, isNull } from 'drizzle-orm';
import { labOf, personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { labs, memberships, nameDecisions, nicheTables, overlapRuns, studies, treeSets } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import * as openings from './openings.ts';

export type Study = {
	readonly id: string;
	readonly labId: string;
	readonly labName: string;
	readonly title: string;
	readonly question: string;
	readonly isExample: boolean;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly changedAt: string;
};

const columns = {
	id: studies.id,
	labId: studies.labId,
	labName: labs.name,
	title: studies.title,
	question: studies.question,
	isExample: studies.isExample,
	createdBy: studies.createdBy,
	createdAt: studies.createdAt,
	changedAt: studies.changedAt
};

type Dated = Omit<Study, 'createdAt' | 'changedAt'> & { createdAt: Date; changedAt: Date };

function fromRow(row: Dated): Study {
	return { ...row, createdAt: row.createdAt.toISOString(), changedAt: row.changedAt.toISOString() };
}

/** The studies of every lab the person belongs to, the one changed last first. */
export async function list(access: Access): Promise<Study[]> {
	const rows = await db()
		.select(columns)
		.from(studies)
		.innerJoin(labs, eq(labs.id, studies.labId))
		.innerJoin(memberships, and(eq(memberships.labId, labs.id), eq(memberships.userId, personOf(access))))
		.where(isNull(studies.deletedAt))
		.orderBy(desc(studies.changedAt), desc(studies.id));
	return rows.map(fromRow);
}

/** What ships with the program; anybody may read it. */
export async function listExamples(): Promise<Study[]> {
	const rows = await db()
		.select(columns)
		.from(studies)
		.innerJoin(labs, eq(labs.id, studies.labId))
		.where(and(eq(studies.isExample, true), isNull(studies.deletedAt)))
		.orderBy(studies.title);
	return rows.map(fromRow);
}

/** The study that the access covers. */
export async function find(access: Access): Promise<Study | null> {
	const rows = await db()
		.select(columns)
		.from(studies)
		.innerJoin(labs, eq(labs.id, studies.labId))
		.where(and(eq(studies.id, studyOf(access)), isNull(studies.deletedAt)));
	return rows[0] === undefined ? null : fromRow(rows[0]);
}

export type StudyFacts = { readonly title: string; readonly question?: string | undefined; readonly isExample?: boolean };

/** @param access - to the lab that will hold the study */
export async function create(access: Access, { title, question = '', isExample = false }: StudyFacts): Promise<Study> {
	const id = newId();
	const row = { id, labId: labOf(access), title, question, isExample, createdBy: personOf(access) };
	return transaction(async (tx) => {
		await tx.insert(studies).values(row);
		const inside = { ...access, studyId: id };
		await logBook.append(inside, { action: 'study.made', detail: { title } });
		const made = await find(inside);
		if (made === null) throw new Error('Expected the new study back from the database; got nothing.');
		return made;
	});
}

export async function rename(access: Access, { title, question }: StudyFacts): Promise<boolean> {
	return change(access, { title, ...(question === undefined ? {} : { question }) }, 'study.changed');
}

export async function remove(access: Access): Promise<boolean> {
	return change(access, { deletedAt: new Date() }, 'study.deleted');
}

export async function restore(access: Access): Promise<boolean> {
	return change(access, { deletedAt: null }, 'study.restored');
}

/** For the log book of jobs, whose access names no lab. */
export async function labIdOf(id: string): Promise<string | null> {
	const rows = await db().select({ labId: studies.labId }).from(studies).where(eq(studies.id, id));
	return rows[0]?.labId ?? null;
}

/** Something in the study has changed now. */
export async function touch(access: Access): Promise<void> {
	await db()
		.update(studies)
		.set({ changedAt: new Date() })
		.where(eq(studies.id, studyOf(access)));
}

type Values = Partial<typeof studies.$inferInsert>;

function change(access: Access, values: Values, action: logBook.LoggedAction): Promise<boolean> {
	return transaction(async (tx) => {
		const changed = await tx
			.update(studies)
			.set({ ...values, changedAt: new Date() })
			.where(eq(studies.id, studyOf(access)))
			.returning({ title: studies.title });
		if (changed[0] === undefined) return false;
		await logBook.append(access, { action, detail: { title: changed[0].title } });
		return true;
	});
}

/**
 * A new study with the materials and the name decisions of another; analyses and reports stay behind, for they belong
 * to what was asked there.
 * @param source - may read the study that is copied
 * @param target - may create in the lab that will hold the copy
 */
export function copy(source: Access, target: Access, title: string): Promise<Study | null> {
	return transaction(async () => {
		const original = await find(source);
		if (original === null) return null;
		const made = await create(target, { title, question: original.question });
		const inside = { ...target, studyId: made.id };
		await copyMaterials(source, inside);
		await logBook.append(inside, { action: 'study.copied', detail: { from: original.id, title } });
		return made;
	});
}

async function copyMaterials(source: Access, target: Access): Promise<void> {
	const studyId = studyOf(target);
	const createdBy = personOf(target);
	const from = studyOf(source);
	const trees = await db()
		.select()
		.from(treeSets)
		.where(and(eq(treeSets.studyId, from), isNull(treeSets.deletedAt)));
	for (const row of trees)
		await db()
			.insert(treeSets)
			.values({ ...row, id: newId(), studyId, createdBy, replaces: null });
	const runs = await db()
		.select()
		.from(overlapRuns)
		.where(and(eq(overlapRuns.studyId, from), isNull(overlapRuns.deletedAt)));
	for (const row of runs) {
		const copied = { ...row, id: newId(), studyId, createdBy, replaces: null };
		await db().insert(overlapRuns).values(copied);
		await openings.inherit(target, copied, { access: source, id: row.id });
	}
	const tables = await db()
		.select()
		.from(nicheTables)
		.where(and(eq(nicheTables.studyId, from), isNull(nicheTables.deletedAt)));
	for (const row of tables)
		await db()
			.insert(nicheTables)
			.values({ ...row, id: newId(), studyId, createdBy, replaces: null });
	const decided = await db().select().from(nameDecisions).where(eq(nameDecisions.studyId, from)).orderBy(nameDecisions.id);
	for (const { fromName, toTip, why, withdrawn } of decided) {
		await db().insert(nameDecisions).values({ studyId, fromName, toTip, why, withdrawn, decidedBy: createdBy });
	}
}
