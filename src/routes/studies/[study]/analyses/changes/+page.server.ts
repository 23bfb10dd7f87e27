import { fail, redirect } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import { runStale } from '../renewals.server.ts';
import { changesPage } from './changesPage.server.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	return changesPage(access);
};

export const actions: Actions = {
	again: async ({ params, locals }) => {
		const access = await can(locals.user, 'run', { study: params.study });
		const notRun = await runStale(access);
		if (notRun.length > 0) return fail(422, { notRun });
		redirect(303, `/studies/${params.study}/analyses/changes`);
	}
};
