import { and, desc, eq, lt, type SQL } from 'drizzle-orm';
import { labOf, studyOf, type Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { logEntries, studies, users } from '#lib/server/db/schema.ts';
import { logWords } from '#lib/server/logWords.ts';

/** An entry of the log book as a page shows it. */
export type LogLine = {
	readonly id: number;
	readonly at: string;
	/** name of the person; the program itself where nobody stands behind it */
	readonly who: string;
	readonly what: string;
	/** null outside a study, and where the study itself is named already */
	readonly study: { readonly id: string; readonly title: string } | null;
};

export type Stretch = { readonly limit: number; /** id of the last line seen; the older ones follow */ readonly before?: number };

/** Newest first. */
export function ofStudy(access: Access, stretch: Stretch): Promise<LogLine[]> {
	return lines(eq(logEntries.studyId, studyOf(access)), stretch);
}

/** Newest first. */
export function ofLab(access: Access, stretch: Stretch): Promise<LogLine[]> {
	return lines(eq(logEntries.labId, labOf(access)), stretch);
}

async function lines(where: SQL, { limit, before }: Stretch): Promise<LogLine[]> {
	const older = before === undefined ? undefined : lt(logEntries.id, before);
	const rows = await db()
		.select({
			id: logEntries.id,
			at: logEntries.at,
			action: logEntries.action,
			detail: logEntries.detail,
			who: users.name,
			study: { id: studies.id, title: studies.title, deletedAt: studies.deletedAt }
		})
		.from(logEntries)
		.leftJoin(users, eq(users.id, logEntries.userId))
		.leftJoin(studies, eq(studies.id, logEntries.studyId))
		.where(and(where, older))
		.orderBy(desc(logEntries.id))
		.limit(limit);
	return rows.map(({ id, at, action, detail, who, study }) => ({
		id,
		at: at.toISOString(),
		who: who ?? 'Kithline',
		what: logWords(action, detail),
		study: study === null || study.deletedAt !== null || action.startsWith('study.') ? null : { id: study.id, title: study.title }
	}));
}
