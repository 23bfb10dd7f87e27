import { error } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { removeAnalysis, runAgain, stopRunning } from './analysisActions.server.ts';
import { analysisPage } from './analysisPage.server.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const analysis = await analyses.find(access, params.analysis);
	if (!analysis) error(404, 'No analysis at this address, or it is not yours to see.');
	return analysisPage(access, analysis);
};

export const actions: Actions = { stop: stopRunning, again: runAgain, remove: removeAnalysis };
