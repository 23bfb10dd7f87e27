import { and, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm';
import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { Role } from '#lib/contracts/user.ts';
import { personOf, type Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses, labs, memberships, studies, treeSets } from '#lib/server/db/schema.ts';

/** A study as one line of a list. */
export type StudySummary = {
	readonly id: string;
	readonly title: string;
	readonly question: string;
	readonly lab: string;
	readonly role: Role;
	readonly changedAt: string;
	/** of the newest tree set; null before there is one */
	readonly tree: { readonly tips: number; readonly rootAge: number | null; readonly ageUnit: AgeUnit } | null;
	/** title of the newest finding; null before there is one */
	readonly finding: string | null;
};

export type DeletedStudy = { readonly id: string; readonly title: string; readonly lab: string; readonly deletedAt: string };

/** The studies of every lab the person belongs to, the one changed last first. */
export async function list(access: Access): Promise<StudySummary[]> {
	const rows = await db()
		.select({
			id: studies.id,
			title: studies.title,
			question: studies.question,
			lab: labs.name,
			role: memberships.role,
			changedAt: studies.changedAt
		})
		.from(studies)
		.innerJoin(labs, eq(labs.id, studies.labId))
		.innerJoin(memberships, and(eq(memberships.labId, labs.id), eq(memberships.userId, personOf(access))))
		.where(isNull(studies.deletedAt))
		.orderBy(desc(studies.changedAt), desc(studies.id));
	const ids = rows.map((row) => row.id);
	if (ids.length === 0) return [];
	const trees = await newestTrees(ids);
	const findings = await newestFindings(ids);
	return rows.map((row) => ({
		...row,
		changedAt: row.changedAt.toISOString(),
		tree: trees.get(row.id) ?? null,
		finding: findings.get(row.id) ?? null
	}));
}

async function newestTrees(ids: readonly string[]): Promise<Map<string, NonNullable<StudySummary['tree']>>> {
	const rows = await db()
		.selectDistinctOn([treeSets.studyId], {
			studyId: treeSets.studyId,
			ageUnit: treeSets.ageUnit,
			tips: sql<number>`(${treeSets.summary}->>'tipCount')::int`,
			rootAge: sql<number | null>`(${treeSets.summary}->>'rootAge')::float8`
		})
		.from(treeSets)
		.where(and(inArray(treeSets.studyId, [...ids]), isNull(treeSets.deletedAt)))
		.orderBy(treeSets.studyId, desc(treeSets.createdAt));
	return new Map(rows.map(({ studyId, ...tree }) => [studyId, tree]));
}

async function newestFindings(ids: readonly string[]): Promise<Map<string, string>> {
	const rows = await db()
		.selectDistinctOn([analyses.studyId], {
			studyId: analyses.studyId,
			title: sql<string>`${analyses.result}->'finding'->>'title'`
		})
		.from(analyses)
		.where(and(inArray(analyses.studyId, [...ids]), isNull(analyses.deletedAt), isNotNull(analyses.result)))
		.orderBy(analyses.studyId, desc(analyses.createdAt));
	return new Map(rows.map(({ studyId, title }) => [studyId, title]));
}

/** Deleted studies that the person may bring back, the one deleted last first. */
export async function listDeleted(access: Access): Promise<DeletedStudy[]> {
	const isLead = and(
		eq(memberships.labId, studies.labId),
		eq(memberships.userId, personOf(access)),
		eq(memberships.role, 'lead')
	);
	const rows = await db()
		.select({ id: studies.id, title: studies.title, lab: labs.name, deletedAt: studies.deletedAt })
		.from(studies)
		.innerJoin(labs, eq(labs.id, studies.labId))
		.innerJoin(memberships, isLead)
		.where(isNotNull(studies.deletedAt))
		.orderBy(desc(studies.deletedAt));
	return rows.flatMap(({ deletedAt, ...row }) => (deletedAt === null ? [] : [{ ...row, deletedAt: deletedAt.toISOString() }]));
}
