import { answering, onlyMethods } from '#lib/server/api/answering.ts';
import { eventStream } from '#lib/server/api/eventStream.ts';
import { watchAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, request, locals }) => {
	await can(locals.user, 'read', { analysis: params.analysis });
	return eventStream((signal) => watchAnalysis(params.analysis, { signal }), request.signal);
});

export const fallback: RequestHandler = onlyMethods('GET');
