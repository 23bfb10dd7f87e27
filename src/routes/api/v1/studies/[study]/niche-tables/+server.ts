import { nicheTableRequestSchema } from '#lib/contracts/nicheTables.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { nicheTableAnswer } from '#lib/server/api/nicheTableAnswer.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { can } from '#lib/server/permissions.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'create', { study: params.study });
	const kept = await nicheTables.create(access, await readBody(request, nicheTableRequestSchema));
	return answerJson(nicheTableAnswer(kept), 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
