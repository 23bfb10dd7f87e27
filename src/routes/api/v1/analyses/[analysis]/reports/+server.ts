import { reportRequestSchema } from '#lib/contracts/report.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { finished } from '#lib/server/api/finished.ts';
import { found } from '#lib/server/api/found.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { reportAnswer } from '#lib/server/api/reportAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'create', { analysis: params.analysis });
	const body = await readBody(request, reportRequestSchema);
	await finished(access, params.analysis);
	return answerJson(reportAnswer(found(await reports.create(access, params.analysis, body))), 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
