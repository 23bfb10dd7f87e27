import { eq, type SQL } from 'drizzle-orm';
import type { PgColumn } from 'drizzle-orm/pg-core';
import { studyOf, type Access } from '#lib/server/access.ts';

/**
 * Rows of the one study that the access covers; a job of our own covers every study.
 * @param studyId - the column that names the study
 */
export function within(access: Access, studyId: PgColumn): SQL | undefined {
	return access.role === 'system' ? undefined : eq(studyId, studyOf(access));
}
