import { error } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { Actions, PageServerLoad } from './$types';
import { leaveOutForGaps, NOT_FOUND, removeRun, renameRun } from './runActions.server.ts';
import { runPage } from './runPage.server.ts';

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const run = await overlapRuns.find(access, params.run);
	if (run === null) error(404, NOT_FOUND);
	await openings.note(access, run, 'page');
	return runPage(access, run, url.searchParams.get('species'));
};

export const actions: Actions = { rename: renameRun, remove: removeRun, leaveOut: leaveOutForGaps };
