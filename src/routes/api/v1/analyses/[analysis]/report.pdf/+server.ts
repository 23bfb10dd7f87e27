import { answering, onlyMethods } from '#lib/server/api/answering.ts';
import { answerReport } from '#lib/server/api/answerReport.ts';
import { finished } from '#lib/server/api/finished.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, url, locals }) => {
	const access = await can(locals.user, 'download', { analysis: params.analysis });
	const analysis = await finished(access, params.analysis);
	return answerReport(access, analysis, url.searchParams.get('report'));
});

export const fallback: RequestHandler = onlyMethods('GET');
