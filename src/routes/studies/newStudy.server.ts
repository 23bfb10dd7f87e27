import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { newStudyForm, restoreStudyForm } from '#lib/contracts/studyForm.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import * as studies from '#lib/server/repositories/studies.ts';

/** Makes a study in the lab that was chosen, else in the person's own, and leads on to its materials. */
export async function makeStudy({ request, locals }: RequestEvent) {
	const form = await parseForm(request, newStudyForm);
	if (!form.ok) return fail(400, form);
	const { title, question, lab } = form.value;
	const access = await can(locals.user, 'create', { lab: lab ?? locals.user?.ownLab ?? '' });
	const made = await studies.create(access, { title, question });
	redirect(303, `/studies/${made.id}/materials`);
}

export async function restoreStudy({ request, locals }: RequestEvent) {
	const form = await parseForm(request, restoreStudyForm);
	if (!form.ok) return fail(400, form);
	const access = await can(locals.user, 'restore', { study: form.value.id });
	await studies.restore(access);
	redirect(303, '/studies');
}
