import { fail, redirect } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { analysisList } from './analysisList.server.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const list = await analysisList(access, url.searchParams.getAll('compare'));
	return { ...list, justDeleted: list.deleted.find(({ id }) => id === url.searchParams.get('deleted')) ?? null };
};

export const actions: Actions = {
	restore: async ({ params, request, locals }) => {
		const id = (await request.formData()).get('id');
		if (typeof id !== 'string') return fail(400, { message: 'Say which analysis to bring back.' });
		const access = await can(locals.user, 'restore', { analysis: id });
		if (!(await analyses.restore(access, id))) return fail(404, { message: 'That analysis is not in this study any more.' });
		redirect(303, `/studies/${params.study}/analyses/${id}`);
	}
};
