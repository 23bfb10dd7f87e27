import type { z } from 'zod';
import type { namesAnswerSchema } from '#lib/contracts/answers.ts';
import type { Access } from '#lib/server/access.ts';
import * as names from '#lib/server/repositories/names.ts';

type Answer = z.infer<typeof namesAnswerSchema>;

/** The decisions in force, and how the names of the newest tree set and run agree under them. */
export async function namesAnswer(access: Access): Promise<Answer> {
	const decisions = await names.current(access);
	const matching = await names.matching(access);
	if (matching === null) return { decisions, matching };
	const { sentence, pairs, dropped, rows } = matching;
	return { decisions, matching: { sentence, pairs: [...pairs], dropped: [...dropped], open: openRows(rows) } };
}

type Rows = NonNullable<Awaited<ReturnType<typeof names.matching>>>['rows'];

/** What still asks for a decision, with the partner that is proposed. */
function openRows(rows: Rows): NonNullable<Answer['matching']>['open'] {
	return rows
		.filter(({ settled }) => !settled)
		.map(({ species = null, tip = null, kind, reason }) => ({ species, tip, kind, reason }));
}
