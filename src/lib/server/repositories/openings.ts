import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { OPENING_WAYS, type OpeningWay, type PlanContext } from '#lib/contracts/planContext.ts';
import { studyOf, type Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses, logEntries } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import { within } from './scope.ts';

const ACTION = 'overlap-run.opened';
const runIn = sql<string>`${logEntries.detail}->>'overlapRun'`;

/**
 * Writes into the log book that the person has now seen the values of a run; only the first time counts. A visitor
 * without an account leaves no line.
 */
export async function note(access: Access, { id, label }: { id: string; label: string }, by: OpeningWay): Promise<void> {
	if (access.userId === null || (await firstOf(access, id)).has(access.userId)) return;
	await logBook.append(access, { action: ACTION, detail: { overlapRun: id, label, by } });
}

type Opening = { readonly at: string; readonly by: OpeningWay };

/** Who has seen the values of a run, and when first. */
async function firstOf(access: Access, run: string): Promise<Map<string, Opening>> {
	const rows = await db()
		.select({ userId: logEntries.userId, at: logEntries.at, by: sql<string>`${logEntries.detail}->>'by'` })
		.from(logEntries)
		.where(and(eq(logEntries.studyId, studyOf(access)), eq(logEntries.action, ACTION), eq(runIn, run)))
		.orderBy(asc(logEntries.id));
	const first = new Map<string, Opening>();
	for (const { userId, at, by } of rows) {
		if (userId === null || first.has(userId)) continue;
		first.set(userId, { at: at.toISOString(), by: OPENING_WAYS.find((way) => way === by) ?? 'page' });
	}
	return first;
}

/** What is known of a matrix at this moment, as it bears on a plan that is written now. */
export async function contextOf(access: Access, run: string): Promise<PlanContext> {
	const openings = await firstOf(access, run);
	const own = openings.get(access.userId ?? '') ?? null;
	const finished = await db()
		.select({ at: analyses.finishedAt })
		.from(analyses)
		.where(and(within(access, analyses.studyId), eq(analyses.overlapRunId, run), eq(analyses.status, 'finished')));
	const times = finished.flatMap(({ at }) => (at === null ? [] : [at.toISOString()])).sort();
	return {
		opened: own,
		openedByOthers: openings.size - (own === null ? 0 : 1),
		analysedBefore: finished.length,
		lastAnalysed: times.at(-1) ?? null
	};
}

/**
 * The runs that a list may draw in small. A run that the person has never opened, and that no analysis shows, stays
 * folded, so that a question can still be stated before the answer is seen.
 */
export async function drawable(access: Access, runs: readonly { readonly id: string }[]): Promise<ReadonlySet<string>> {
	const ids = runs.map(({ id }) => id);
	if (access.role === 'visitor' || ids.length === 0) return new Set(ids);
	const opened = await db()
		.selectDistinct({ run: runIn })
		.from(logEntries)
		.where(
			and(eq(logEntries.studyId, studyOf(access)), eq(logEntries.action, ACTION), eq(logEntries.userId, access.userId ?? ''))
		);
	const analysed = await db()
		.selectDistinct({ run: analyses.overlapRunId })
		.from(analyses)
		.where(
			and(
				within(access, analyses.studyId),
				inArray(analyses.overlapRunId, ids),
				eq(analyses.status, 'finished'),
				isNull(analyses.deletedAt)
			)
		);
	return new Set([...opened, ...analysed].map(({ run }) => run));
}

/** A copy holds the same values: whoever had seen the one has seen the other. */
export async function inherit(
	access: Access,
	copy: { id: string; label: string },
	original: { access: Access; id: string }
): Promise<void> {
	const by = (await firstOf(original.access, original.id)).get(access.userId ?? '')?.by;
	if (by !== undefined) await note(access, copy, by);
}
