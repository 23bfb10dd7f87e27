import { fail, redirect } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { analysisList } from './analysisList.server.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals, url, parent }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const { study } = await parent();
	const list = await analysisList(access, { withDeleted: study.may.lead, compare: url.searchParams.getAll('compare') });
	return { ...list, justDeleted: list.deleted.find(({ id }) => id === url.searchParams.get('deleted')) ?? null };
};

export const actions: Actions = {
	restore: async ({ params, request, locals }) => {
		const access = await can(locals.user, 'restore', { study: params.study });
		const id = (await request.formData()).get('id');
		const isBack = typeof id === 'string' && (await analyses.restore(access, id));
		if (!isBack) return fail(404, { message: 'That analysis is not in this study any more.' });
		redirect(303, `/studies/${params.study}/analyses/${id}`);
	}
};
