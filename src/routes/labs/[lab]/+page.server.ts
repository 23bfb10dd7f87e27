import { error } from '@sveltejs/kit';
import { can } from '#lib/server/permissions.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as logLines from '#lib/server/repositories/logLines.ts';
import type { PageServerLoad } from './$types';

const LINES_A_PAGE = 50;

export const load: PageServerLoad = async ({ params, locals, url }) => {
	const access = await can(locals.user, 'read', { lab: params.lab });
	const lab = await labs.find(access);
	if (!lab) error(404, 'No lab at this address, or it is not yours to see.');
	const before = beforeOf(url.searchParams.get('before'));
	const lines = await logLines.ofLab(access, { limit: LINES_A_PAGE + 1, ...(before === null ? {} : { before }) });
	const shown = lines.slice(0, LINES_A_PAGE);
	return {
		lab: { id: lab.id, name: lab.name },
		me: locals.user?.id ?? null,
		members: await labs.members(access),
		lines: shown,
		isNewest: before === null,
		/** where the older lines begin; null at the first line of the book */
		older: lines.length > LINES_A_PAGE ? (shown.at(-1)?.id ?? null) : null
	};
};

/** Anything that is no number shows the newest lines. */
function beforeOf(text: string | null): number | null {
	const value = Number(text);
	return text !== null && Number.isSafeInteger(value) && value > 0 ? value : null;
}
