import { and, desc, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { AnalysisProgress, AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisStatus } from '#lib/contracts/materials.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { analyses } from '#lib/server/db/schema.ts';
import { analysisFromRow, listedAnalysis, listedColumns } from './analysisRows.ts';
import type { Analysis, AnalysisFailure, ListedAnalysis, UsedDecision } from './analysisRows.ts';
import * as logBook from './logBook.ts';
import { newId } from './newId.ts';
import * as openings from './openings.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';

export type { Analysis, ListedAnalysis } from './analysisRows.ts';
export { inputsOf } from './analysisInputs.ts';
export { outOfDate } from './outOfDate.ts';

/** Newest first, without results. */
export async function list(access: Access): Promise<ListedAnalysis[]> {
	const rows = await db()
		.select(listedColumns)
		.from(analyses)
		.where(and(within(access, analyses.studyId), isNull(analyses.deletedAt)))
		.orderBy(desc(analyses.createdAt), desc(analyses.id));
	return rows.map(listedAnalysis);
}

/** What may be brought back, the one deleted last first. */
export async function listDeleted(access: Access): Promise<ListedAnalysis[]> {
	const rows = await db()
		.select(listedColumns)
		.from(analyses)
		.where(and(within(access, analyses.studyId), isNotNull(analyses.deletedAt)))
		.orderBy(desc(analyses.deletedAt));
	return rows.map(listedAnalysis);
}

export async function find(access: Access, id: string): Promise<Analysis | null> {
	const rows = await db()
		.select()
		.from(analyses)
		.where(and(eq(analyses.id, id), within(access, analyses.studyId), isNull(analyses.deletedAt)))
		.limit(1);
	return rows[0] === undefined ? null : analysisFromRow(rows[0]);
}

/** The analysis of an equal plan on equal inputs, a deleted one too. */
export async function findByHash(access: Access, hash: string): Promise<ListedAnalysis | null> {
	const rows = await db()
		.select(listedColumns)
		.from(analyses)
		.where(and(eq(analyses.hash, hash), within(access, analyses.studyId)))
		.limit(1);
	return rows[0] === undefined ? null : listedAnalysis(rows[0]);
}

export type NewAnalysis = { readonly plan: Plan; readonly hash: string; readonly decisions: readonly UsedDecision[] };
export type Asked = {
	readonly id: string;
	readonly status: AnalysisStatus;
	/** it waits now and is to be queued */ readonly isNew: boolean;
};

/**
 * Writes the plan down, to be queued by the caller. An equal one that waits, works or has finished is answered in its
 * place; one that was stopped or failed waits again; a deleted one is brought back.
 */
export function create(access: Access, { plan, hash, decisions }: NewAnalysis): Promise<Asked> {
	const id = newId();
	const owner = { studyId: studyOf(access), createdBy: personOf(access) };
	const materials = { treeSetId: plan.treeSet, overlapRunId: plan.overlapRun };
	return transaction(async (tx) => {
		const context = await openings.contextOf(access, plan.overlapRun);
		const added = await tx
			.insert(analyses)
			.values({ id, ...owner, ...materials, plan, context, hash, decisions: [...decisions], status: 'waiting' })
			.onConflictDoNothing()
			.returning({ id: analyses.id });
		if (added.length === 0) return again(access, hash);
		await studies.touch(access);
		await logBook.append(access, { action: 'analysis.asked-for', detail: { analysis: id, hash } });
		return { id, status: 'waiting', isNew: true };
	});
}

/**
 * Writes the plan down with the time and does not run it: it stands as stopped, never begun, until `create` is asked for
 * the same. An equal one that is there already is answered as it is; a declaration never comes after a result.
 */
export function declare(access: Access, { plan, hash, decisions }: NewAnalysis): Promise<Asked> {
	const id = newId();
	const owner = { studyId: studyOf(access), createdBy: personOf(access) };
	const materials = { treeSetId: plan.treeSet, overlapRunId: plan.overlapRun };
	const written = { plan, hash, decisions: [...decisions], declaredAt: new Date() };
	return transaction(async (tx) => {
		const context = await openings.contextOf(access, plan.overlapRun);
		const added = await tx
			.insert(analyses)
			.values({ id, ...owner, ...materials, ...written, context, status: 'stopped' })
			.onConflictDoNothing()
			.returning({ id: analyses.id });
		if (added.length === 0) return standing(access, hash);
		await studies.touch(access);
		await logBook.append(access, { action: 'analysis.declared', detail: { analysis: id, hash } });
		return { id, status: 'stopped', isNew: true };
	});
}

async function standing(access: Access, hash: string): Promise<Asked> {
	const held = await findByHash(access, hash);
	if (held === null) throw new Error('Expected the analysis that holds this hash; it is not there.');
	if (held.deletedAt !== null) await restore(access, held.id);
	return { id: held.id, status: held.status, isNew: false };
}

async function again(access: Access, hash: string): Promise<Asked> {
	const held = await standing(access, hash);
	const renewed = await db()
		.update(analyses)
		.set({ status: 'waiting', progress: null, failure: null, startedAt: null, finishedAt: null, heartbeatAt: null })
		.where(and(eq(analyses.id, held.id), inArray(analyses.status, ['stopped', 'failed'])))
		.returning({ id: analyses.id });
	if (renewed.length === 0) return { id: held.id, status: held.status, isNew: false };
	await logBook.append(access, { action: 'analysis.asked-for', detail: { analysis: held.id, hash, again: true } });
	return { id: held.id, status: 'waiting', isNew: true };
}

export async function remove(access: Access, id: string): Promise<boolean> {
	return setDeleted(access, id, new Date());
}

export async function restore(access: Access, id: string): Promise<boolean> {
	return setDeleted(access, id, null);
}

function setDeleted(access: Access, id: string, deletedAt: Date | null): Promise<boolean> {
	return transaction(async (tx) => {
		const changed = await tx
			.update(analyses)
			.set({ deletedAt })
			.where(and(eq(analyses.id, id), within(access, analyses.studyId)))
			.returning({ id: analyses.id });
		if (changed.length === 0) return false;
		await studies.touch(access);
		const action = deletedAt === null ? 'analysis.restored' : 'analysis.deleted';
		await logBook.append(access, { action, detail: { analysis: id } });
		return true;
	});
}

/** A worker takes it. False when it no longer waits: it was stopped, or another worker has it. */
export function markWorking(access: Access, id: string): Promise<boolean> {
	const now = new Date();
	const values = { status: 'working', startedAt: now, heartbeatAt: now, progress: null } as const;
	return move(access, id, { from: ['waiting'], values, action: 'analysis.started' });
}

/** Keeps how far it is, which is also a sign of life of its worker. */
export async function saveProgress(access: Access, id: string, progress: AnalysisProgress): Promise<void> {
	await db()
		.update(analyses)
		.set({ progress, heartbeatAt: new Date() })
		.where(and(eq(analyses.id, id), within(access, analyses.studyId), eq(analyses.status, 'working')));
}

/** A result is written once and never changed. */
export function markFinished(access: Access, id: string, result: AnalysisResult): Promise<boolean> {
	const values = { status: 'finished', result, finishedAt: new Date(), heartbeatAt: null } as const;
	return move(access, id, { from: ['working'], values, action: 'analysis.finished' });
}

export function markStopped(access: Access, id: string): Promise<boolean> {
	const values = { status: 'stopped', finishedAt: new Date(), heartbeatAt: null } as const;
	return move(access, id, { from: ['waiting', 'working'], values, action: 'analysis.stopped' });
}

export function markFailed(access: Access, id: string, failure: AnalysisFailure): Promise<boolean> {
	const values = { status: 'failed', failure, finishedAt: new Date(), heartbeatAt: null } as const;
	return move(access, id, { from: ['working'], values, action: 'analysis.failed' });
}

type Move = {
	from: AnalysisStatus[];
	values: Partial<typeof analyses.$inferInsert>;
	action: logBook.LoggedAction;
};

/** A status only moves along the arrows of the job states, and each step is in the log book. */
function move(access: Access, id: string, { from, values, action }: Move): Promise<boolean> {
	return transaction(async (tx) => {
		const moved = await tx
			.update(analyses)
			.set(values)
			.where(and(eq(analyses.id, id), within(access, analyses.studyId), inArray(analyses.status, from)))
			.returning({ studyId: analyses.studyId });
		if (moved[0] === undefined) return false;
		const labId = access.labId ?? (await studies.labIdOf(moved[0].studyId));
		await logBook.append({ userId: access.userId, labId, studyId: moved[0].studyId }, { action, detail: { analysis: id } });
		return true;
	});
}
