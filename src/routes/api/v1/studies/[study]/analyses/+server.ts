import { planRequestSchema } from '#lib/contracts/plan.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { startAnalysis } from '#lib/server/api/startAnalysis.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'run', { study: params.study });
	const plan = await readBody(request, planRequestSchema);
	const started = await startAnalysis(access, plan);
	return answerJson(started, started.status === 'finished' ? 200 : 202);
});

export const fallback: RequestHandler = onlyMethods('POST');
