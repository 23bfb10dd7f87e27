import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { covariateAnswer } from '#lib/server/api/covariateAnswer.ts';
import { found } from '#lib/server/api/found.ts';
import { can } from '#lib/server/permissions.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { covariate: params.covariate });
	return answerJson(covariateAnswer(found(await covariates.find(access, params.covariate))));
});

export const fallback: RequestHandler = onlyMethods('GET');
