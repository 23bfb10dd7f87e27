import { fail, redirect } from '@sveltejs/kit';
import type { Access } from '#lib/server/access.ts';
import { restorable } from '#lib/server/deletion.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import type { Actions, PageServerLoad } from './$types';
import { restsOnOld } from './restsOnOld.server.ts';

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const asked = await analyses.list(access);
	const deleted = restorable(access, await reports.listDeleted(access));
	return {
		reports: await Promise.all((await reports.list(access)).map((report) => reportLine(access, report, asked))),
		newestFinished: asked.find(({ status }) => status === 'finished')?.id ?? null,
		deleted: deleted.map(({ id, title, changedAt }) => ({ id, title, changedAt })),
		justDeleted: deleted.find(({ id }) => id === url.searchParams.get('deleted'))?.id ?? null
	};
};

async function reportLine(access: Access, report: reports.Report, asked: readonly analyses.ListedAnalysis[]) {
	const { id, title, author, changedAt, analysisId } = report;
	const finding = asked.find((analysis) => analysis.id === analysisId)?.headline?.title ?? null;
	return { id, title, author, changedAt, finding, isOutOfDate: await restsOnOld(access, report, asked) };
}

export const actions: Actions = {
	restore: async ({ params, request, locals }) => {
		const id = (await request.formData()).get('id');
		if (typeof id !== 'string') return fail(400, { message: 'Say which report to bring back.' });
		const access = await can(locals.user, 'restore', { report: id });
		if (!(await reports.restore(access, id))) return fail(404, { message: 'That report is not in this study any more.' });
		redirect(303, `/studies/${params.study}/reports/${id}`);
	}
};
