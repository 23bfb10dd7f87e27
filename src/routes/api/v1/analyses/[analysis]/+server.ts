import { analysisAnswer } from '#lib/server/api/analysisAnswer.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { analysis: params.analysis });
	const analysis = found(await analyses.find(access, params.analysis));
	return answerJson(analysisAnswer(analysis, await analyses.outOfDate(access, analysis)));
});

export const fallback: RequestHandler = onlyMethods('GET');
