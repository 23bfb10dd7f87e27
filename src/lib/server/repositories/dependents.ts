import { and, eq, isNull, sql } from 'drizzle-orm';
import type { AccessObject } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses, reports } from '#lib/server/db/schema.ts';

export type StudyPart = Exclude<
	AccessObject,
	{ readonly account: string } | { readonly lab: string } | { readonly study: string }
>;

/**
 * Whether something that still stands rests on a part of a study: an analysis on a material, a report on an analysis. A
 * plan names every material by its id.
 */
export async function isUsed(part: StudyPart): Promise<boolean> {
	if ('report' in part) return false;
	if ('analysis' in part) {
		const rows = await db()
			.select({ id: reports.id })
			.from(reports)
			.where(and(eq(reports.analysisId, part.analysis), isNull(reports.deletedAt)))
			.limit(1);
		return rows.length > 0;
	}
	const [id = ''] = Object.values(part);
	const rows = await db()
		.select({ id: analyses.id })
		.from(analyses)
		.where(and(isNull(analyses.deletedAt), sql`position(${id} in ${analyses.plan}::text) > 0`))
		.limit(1);
	return rows.length > 0;
}
