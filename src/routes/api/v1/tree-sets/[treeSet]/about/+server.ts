import { treeAboutSchema } from '#lib/contracts/treeAbout.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { can } from '#lib/server/permissions.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { RequestHandler } from './$types';

export const PUT: RequestHandler = answering(async ({ params, request, locals }) => {
	const access = await can(locals.user, 'change', { treeSet: params.treeSet });
	const about = await readBody(request, treeAboutSchema);
	await treeSets.describe(access, params.treeSet, about);
	return answerJson(about);
});

export const fallback: RequestHandler = onlyMethods('PUT');
