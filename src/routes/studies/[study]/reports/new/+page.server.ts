import { error, fail, redirect } from '@sveltejs/kit';
import { writeCaption } from '#lib/analysis/words/caption.ts';
import { reportForm } from '#lib/contracts/reportForm.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import { reportValues } from '../reportValues.ts';
import type { Actions, PageServerLoad } from './$types';

const NOT_FINISHED = 'A report is saved from a finished analysis; there is none at this address.';

export const load: PageServerLoad = async ({ params, url, locals }) => {
	const access = await can(locals.user, 'create', { study: params.study });
	const analysis = await analyses.find(access, url.searchParams.get('analysis') ?? '');
	if (!analysis?.result) error(404, NOT_FINISHED);
	const words = { title: analysis.result.finding.title, caption: writeCaption(analysis.result), notes: '' };
	return { analysis: analysis.id, values: reportValues(words) };
};

export const actions: Actions = {
	default: async ({ params, url, request, locals }) => {
		const access = await can(locals.user, 'create', { study: params.study });
		const form = await parseForm(request, reportForm);
		if (!form.ok) return fail(400, { values: form.values, faults: form.faults });
		const saved = await reports.create(access, url.searchParams.get('analysis') ?? '', form.value);
		if (!saved) error(404, NOT_FINISHED);
		redirect(303, `/studies/${params.study}/reports/${saved.id}`);
	}
};
