import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { LARGE_BODY_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { checkOverlapRun } from '#lib/server/api/checkOverlapRun.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { can } from '#lib/server/permissions.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import { z } from 'zod';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'create', { study: params.study });
	const body = checkOverlapRun(await readBody(request, z.unknown(), LARGE_BODY_LIMIT_BYTES));
	const { id, species, remarks } = await overlapRuns.create(access, body);
	return answerJson({ id, species, remarks }, 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
