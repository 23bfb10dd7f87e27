import { covariateRequestSchema } from '#lib/contracts/covariates.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { LARGE_BODY_LIMIT_BYTES, MATRIX_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { readBody, refuseLargeText } from '#lib/server/api/readBody.ts';
import { can } from '#lib/server/permissions.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'create', { study: params.study });
	const body = await readBody(request, covariateRequestSchema, LARGE_BODY_LIMIT_BYTES);
	refuseLargeText(body.csv ?? body.places ?? '', MATRIX_TEXT_LIMIT_BYTES, 'a covariate text');
	const { id, species, remarks } = await covariates.create(access, body);
	return answerJson({ id, species, remarks }, 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
