import { fail, redirect } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals, url, parent }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const { study } = await parent();
	const asked = await analyses.list(access);
	const deleted = study.may.lead ? await reports.listDeleted(access) : [];
	return {
		reports: (await reports.list(access)).map(({ id, title, author, changedAt, analysisId }) => ({
			...{ id, title, author, changedAt },
			finding: asked.find((analysis) => analysis.id === analysisId)?.headline?.title ?? null
		})),
		newestFinished: asked.find(({ status }) => status === 'finished')?.id ?? null,
		deleted: deleted.map(({ id, title, changedAt }) => ({ id, title, changedAt })),
		justDeleted: deleted.find(({ id }) => id === url.searchParams.get('deleted'))?.id ?? null
	};
};

export const actions: Actions = {
	restore: async ({ params, request, locals }) => {
		const access = await can(locals.user, 'restore', { study: params.study });
		const id = (await request.formData()).get('id');
		const isBack = typeof id === 'string' && (await reports.restore(access, id));
		if (!isBack) return fail(404, { message: 'That report is not in this study any more.' });
		redirect(303, `/studies/${params.study}/reports/${id}`);
	}
};
