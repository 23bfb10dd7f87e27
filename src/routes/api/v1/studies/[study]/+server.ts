import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { listedParts, studyAnswer } from '#lib/server/api/studyAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const study = found(await studies.find(access));
	return answerJson({ ...studyAnswer(study), ...(await listedParts(access)) });
});

export const fallback: RequestHandler = onlyMethods('GET');
