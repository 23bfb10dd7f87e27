import { namesRequestSchema } from '#lib/contracts/materials.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { namesAnswer } from '#lib/server/api/namesAnswer.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { settleNames } from '#lib/server/api/settleNames.ts';
import { can } from '#lib/server/permissions.ts';
import * as names from '#lib/server/repositories/names.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	return answerJson(await namesAnswer(access));
});

export const PUT: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'change', { study: params.study });
	const { decisions } = await readBody(request, namesRequestSchema);
	await names.replaceAll(access, await settleNames(access, decisions));
	return answerJson(await namesAnswer(access));
});

export const fallback: RequestHandler = onlyMethods('GET', 'PUT');
