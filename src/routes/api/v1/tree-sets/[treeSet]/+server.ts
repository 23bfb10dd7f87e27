import { treeQuerySchema } from '#lib/contracts/answers.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { found } from '#lib/server/api/found.ts';
import { readQuery } from '#lib/server/api/readQuery.ts';
import { readStructure } from '#lib/server/api/readStructure.ts';
import { treeSetAnswer } from '#lib/server/api/treeSetAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, url, locals }) => {
	const access = await can(locals.user, 'read', { treeSet: params.treeSet });
	const { tree, members } = readQuery(url, treeQuerySchema);
	const treeSet = found(await treeSets.find(access, params.treeSet));
	const structure = await readStructure(treeSet, tree);
	return answerJson(treeSetAnswer(treeSet, structure, { tree, withMembers: members === '1' }));
});

export const fallback: RequestHandler = onlyMethods('GET');
