import { error, redirect } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import { reportPage } from './reportPage.server.ts';
import type { Actions, PageServerLoad } from './$types';

const NOT_FOUND = 'No report at this address, or it is not yours to see.';

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const report = await reports.find(access, params.report);
	if (!report) error(404, NOT_FOUND);
	return reportPage(access, report);
};

export const actions: Actions = {
	remove: async ({ params, locals }) => {
		const access = await can(locals.user, 'delete', { report: params.report });
		if (!(await reports.remove(access, params.report))) error(404, NOT_FOUND);
		redirect(303, `/studies/${params.study}/reports?deleted=${params.report}`);
	}
};
