import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { overlapRunAnswer } from '#lib/server/api/overlapRunAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { overlapRun: params.overlapRun });
	const run = found(await overlapRuns.find(access, params.overlapRun));
	await openings.note(access, run, 'script');
	return answerJson(overlapRunAnswer(run));
});

export const fallback: RequestHandler = onlyMethods('GET');
