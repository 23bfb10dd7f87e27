import { can } from '#lib/server/permissions.ts';
import type { PageServerLoad } from './$types';
import { overlapsPage } from './overlapsPage.server.ts';

export const load: PageServerLoad = async ({ params, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	return overlapsPage(access);
};
