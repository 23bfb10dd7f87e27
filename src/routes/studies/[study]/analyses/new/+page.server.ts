import { can } from '#lib/server/permissions.ts';
import { planPage } from '../planPage.server.ts';
import { declarePlan, runPlan } from './planActions.server.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'run', { study: params.study });
	return planPage(access, url.searchParams);
};

export const actions: Actions = { run: runPlan, declare: declarePlan };
