import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { nicheTableAnswer } from '#lib/server/api/nicheTableAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { nicheTable: params.nicheTable });
	return answerJson(nicheTableAnswer(found(await nicheTables.find(access, params.nicheTable))));
});

export const fallback: RequestHandler = onlyMethods('GET');
