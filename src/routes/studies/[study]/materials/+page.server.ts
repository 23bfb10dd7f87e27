import { fail, redirect } from '@sveltejs/kit';
import { materialSchema } from '#lib/contracts/materialForms.ts';
import { can } from '#lib/server/permissions.ts';
import type { Actions, PageServerLoad, RequestEvent } from './$types';
import {
	copyMaterial,
	correctMaterial,
	describeTree,
	removeMaterial,
	renameMaterial,
	restoreMaterial,
	runAgain,
	settleMaterial
} from './careActions.server.ts';
import { keep, lookAt } from './intake.server.ts';
import { keptBeside } from './keptBeside.server.ts';
import { materialsPage, replacing } from './materialsPage.server.ts';
import { readUpload } from './readUpload.server.ts';
import { uploadRefusal } from './uploadRefusal.server.ts';

export const load: PageServerLoad = async ({ params, locals, url, parent }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const { study } = await parent();
	const page = await materialsPage(access);
	return {
		...page,
		replacing: study.may.change ? await replacing(access, replacedBy(url)) : null,
		kept: url.searchParams.get('kept'),
		justDeleted: page.deleted.find(({ id }) => id === url.searchParams.get('deleted')) ?? null
	};
};

/** The page that asked still holds the text; a page without scripts gets it back. */
const holdsText = ({ request }: RequestEvent) => request.headers.get('x-sveltekit-action') === 'true';

export const actions: Actions = {
	look: async (event) => {
		const access = await can(event.locals.user, 'create', { study: event.params.study });
		const upload = await readUpload(event.request).catch(uploadRefusal);
		if ('message' in upload) return fail(413, { message: upload.message });
		const draft = await lookAt(upload, await keptBeside(access, replacedBy(event.url)));
		return { draft: holdsText(event) ? { ...draft, text: '' } : draft };
	},
	keep: async (event) => {
		const { params, locals, url } = event;
		const replaces = replacedBy(url);
		const access = await can(locals.user, replaces === null ? 'create' : 'change', { study: params.study });
		const upload = await readUpload(event.request).catch(uploadRefusal);
		if ('message' in upload) return fail(413, { message: upload.message });
		const kept = await keep(access, upload, replaces);
		if (!kept.ok) return fail(422, { draft: holdsText(event) ? { ...kept.draft, text: '' } : kept.draft });
		redirect(303, `/studies/${params.study}/materials?kept=${kept.id}`);
	},
	rename: renameMaterial,
	copy: copyMaterial,
	remove: removeMaterial,
	restore: restoreMaterial,
	settle: settleMaterial,
	correct: correctMaterial,
	about: describeTree,
	again: runAgain
};

function replacedBy(url: URL) {
	return materialSchema.safeParse(url.searchParams.get('replace')).data ?? null;
}
