import { error, fail, redirect } from '@sveltejs/kit';
import { reportForm } from '#lib/contracts/reportForm.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import { reportValues } from '../../reportValues.ts';
import type { Actions, PageServerLoad } from './$types';

const NOT_FOUND = 'No report at this address, or it is not yours to see.';

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'change', { study: params.study });
	const report = await reports.find(access, params.report);
	if (!report) error(404, NOT_FOUND);
	return { report: report.id, analysis: report.analysisId, values: reportValues(report, report.figure) };
};

export const actions: Actions = {
	default: async ({ params, request, locals }) => {
		const access = await can(locals.user, 'change', { study: params.study });
		const form = await parseForm(request, reportForm);
		if (!form.ok) return fail(400, { values: form.values, faults: form.faults });
		const report = await reports.find(access, params.report);
		if (!report) error(404, NOT_FOUND);
		const { caption, ...rest } = form.value;
		// A caption that was not touched stays marked as written for the result.
		await reports.update(access, report.id, { ...rest, ...(caption === report.caption ? {} : { caption }) });
		redirect(303, `/studies/${params.study}/reports/${report.id}`);
	}
};
