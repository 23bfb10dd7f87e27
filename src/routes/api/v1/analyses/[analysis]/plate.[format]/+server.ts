import { plateQuerySchema } from '#lib/contracts/answers.ts';
import { answerPlate } from '#lib/server/api/answerPlate.ts';
import { answering, onlyMethods } from '#lib/server/api/answering.ts';
import { finished } from '#lib/server/api/finished.ts';
import { readQuery } from '#lib/server/api/readQuery.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, url, locals }) => {
	const access = await can(locals.user, 'download', { analysis: params.analysis });
	const settings = readQuery(url, plateQuerySchema);
	const analysis = await finished(access, params.analysis);
	return answerPlate(access, analysis, { format: params.format, settings });
});

export const fallback: RequestHandler = onlyMethods('GET');
