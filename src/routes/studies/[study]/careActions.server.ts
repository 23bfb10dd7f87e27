import { error, fail, redirect } from '@sveltejs/kit';
import type { RequestEvent } from './$types';
import { copyStudyForm, renameStudyForm } from '#lib/contracts/studyForm.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import * as studies from '#lib/server/repositories/studies.ts';

const NOT_FOUND = 'No study at this address, or it is not yours to see.';

export async function renameStudy({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, renameStudyForm);
	if (!form.ok) return fail(400, form);
	await studies.rename(access, form.value);
	redirect(303, `/studies/${params.study}`);
}

/** Whoever may read a study may copy it into a lab where they may make studies. */
export async function copyStudy({ params, request, locals }: RequestEvent) {
	const source = await can(locals.user, 'read', { study: params.study });
	const form = await parseForm(request, copyStudyForm);
	if (!form.ok) return fail(400, form);
	const target = await can(locals.user, 'create', { lab: form.value.lab ?? locals.user?.ownLab ?? '' });
	const original = await studies.find(source);
	if (!original) error(404, NOT_FOUND);
	const made = await studies.copy(source, target, copyTitle(original.title));
	if (!made) error(404, NOT_FOUND);
	redirect(303, `/studies/${made.id}`);
}

export async function removeStudy({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'delete', { study: params.study });
	await studies.remove(access);
	redirect(303, `/studies?deleted=${params.study}`);
}

const MOST_CHARACTERS = 200;
const SUFFIX = ' (copy)';

function copyTitle(title: string): string {
	return title.slice(0, MOST_CHARACTERS - SUFFIX.length) + SUFFIX;
}
