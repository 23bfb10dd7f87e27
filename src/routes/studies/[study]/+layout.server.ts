import { error } from '@sveltejs/kit';
import { can, mayRole } from '#lib/server/permissions.ts';
import { stations } from '#lib/server/repositories/stations.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import type { LayoutServerLoad } from './$types';
import { marginStations } from './marginStations.ts';

const NOT_FOUND = 'No study at this address, or it is not yours to see.';

export const load: LayoutServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const found = await studies.find(access);
	if (!found) error(404, NOT_FOUND);
	const { id, title, isExample, labId, labName } = found;
	const role = access.role === 'system' ? 'visitor' : access.role;
	const may = {
		change: role !== 'visitor' && mayRole(role, 'change', 'study'),
		lead: role === 'lead',
		copy: locals.user !== null
	};
	return {
		study: { id, title, isExample, role, may, lab: { id: labId, name: labName } },
		stations: marginStations(id, await stations(access)),
		// Reading the path makes the margin fresh on every page of the study: what one page changes, the next one shows.
		path: url.pathname
	};
};
