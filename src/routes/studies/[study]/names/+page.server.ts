import { can } from '#lib/server/permissions.ts';
import type { Actions, PageServerLoad } from './$types';
import { acceptAll, leaveOut, pairNames, undo } from './nameActions.server.ts';
import { namesPage } from './namesPage.server.ts';

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	return namesPage(access, { tree: url.searchParams.get('tree'), run: url.searchParams.get('run') });
};

export const actions: Actions = { pair: pairNames, leaveOut, acceptAll, undo };
