import { agesQuerySchema } from '#lib/contracts/answers.ts';
import { answerAges } from '#lib/server/api/answerAges.ts';
import { answering, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { readQuery } from '#lib/server/api/readQuery.ts';
import { can } from '#lib/server/permissions.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, url, request, locals }) => {
	const access = await can(locals.user, 'read', { treeSet: params.treeSet });
	const { tree, species } = readQuery(url, agesQuerySchema, { lists: ['species'] });
	const treeSet = found(await treeSets.find(access, params.treeSet));
	const asCsv = request.headers.get('accept')?.includes('text/csv') === true;
	return answerAges(treeSet, { tree, species, asCsv });
});

export const fallback: RequestHandler = onlyMethods('GET');
