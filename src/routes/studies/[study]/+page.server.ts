import { error } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as logLines from '#lib/server/repositories/logLines.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import type { Actions, PageServerLoad } from './$types';
import { copyStudy, removeStudy, renameStudy } from './careActions.server.ts';
import { studyHome } from './studyHome.server.ts';

const LOG_LINES = 3;

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const study = await studies.find(access);
	if (!study) error(404, 'No study at this address, or it is not yours to see.');
	return {
		question: study.question,
		changedAt: study.changedAt,
		...(await studyHome(access, study.id)),
		// A visitor reads what was found, not who did what when.
		log: access.role === 'visitor' ? [] : await logLines.ofStudy(access, { limit: LOG_LINES }),
		labs: await labsForCopy(locals.user)
	};
};

async function labsForCopy(user: App.Locals['user']) {
	if (user === null) return [];
	const memberships = await labs.ofPerson(await can(user, 'read', { account: user.id }));
	return memberships.filter(({ role }) => role !== 'reader').map(({ id, name }) => ({ id, name }));
}

export const actions: Actions = { rename: renameStudy, copy: copyStudy, remove: removeStudy };
