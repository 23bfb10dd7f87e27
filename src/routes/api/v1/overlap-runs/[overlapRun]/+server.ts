import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { overlapRunAnswer } from '#lib/server/api/overlapRunAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { overlapRun: params.overlapRun });
	return answerJson(overlapRunAnswer(found(await overlapRuns.find(access, params.overlapRun))));
});

export const fallback: RequestHandler = onlyMethods('GET');
