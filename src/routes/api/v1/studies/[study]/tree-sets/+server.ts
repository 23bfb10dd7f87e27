import { treeSetRequestSchema } from '#lib/contracts/materials.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { LARGE_BODY_LIMIT_BYTES, TREE_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { readBody, refuseLargeText } from '#lib/server/api/readBody.ts';
import { treeSetFacts } from '#lib/server/api/treeSetAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'create', { study: params.study });
	const body = await readBody(request, treeSetRequestSchema, LARGE_BODY_LIMIT_BYTES);
	refuseLargeText(body.text, TREE_TEXT_LIMIT_BYTES, 'a text of trees');
	const treeSet = await treeSets.create(access, body);
	return answerJson({ id: treeSet.id, ...treeSetFacts(treeSet), remarks: treeSet.remarks }, 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
