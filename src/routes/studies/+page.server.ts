import { can } from '#lib/server/permissions.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import * as summaries from '#lib/server/repositories/studySummaries.ts';
import type { Actions, PageServerLoad } from './$types';
import { makeStudy, restoreStudy } from './newStudy.server.ts';

export const load: PageServerLoad = async ({ locals, url }) => {
	const access = await can(locals.user, 'read', { account: locals.user?.id ?? '' });
	const [own, deleted, examples, memberships] = [
		await summaries.list(access),
		await summaries.listDeleted(access),
		await studies.listExamples(),
		await labs.ofPerson(access)
	];
	return {
		studies: own,
		deleted,
		justDeleted: deleted.find(({ id }) => id === url.searchParams.get('deleted')) ?? null,
		examples: examples.map(({ id, title }) => ({ id, title })),
		labs: memberships.filter(({ role }) => role !== 'reader').map(({ id, name }) => ({ id, name }))
	};
};

export const actions: Actions = { create: makeStudy, restore: restoreStudy };
