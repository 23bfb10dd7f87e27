import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { stopAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'run', { analysis: params.analysis });
	// Only what still waits or works can be stopped; asking again, or too late, changes nothing.
	if (await analyses.markStopped(access, params.analysis)) await stopAnalysis(params.analysis);
	const { id, status } = found(await analyses.find(access, params.analysis));
	return answerJson({ id, status });
});

export const fallback: RequestHandler = onlyMethods('POST');
