import { error, fail, redirect } from '@sveltejs/kit';
import { z } from 'zod';
import { renameMaterialForm } from '#lib/contracts/materialForms.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import * as names from '#lib/server/repositories/names.ts';
import { matrixOf } from '#lib/server/repositories/overlapRunRows.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { RequestEvent } from './$types';
import { gapProposal } from './gapProposal.ts';

export const NOT_FOUND = 'No overlap run at this address, or it is not yours to see.';

const labelForm = z.object({ label: renameMaterialForm.shape.label });

export async function renameRun({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, labelForm);
	if (!form.ok) return fail(400, { label: form.values['label'] ?? '', fault: form.faults['label'] ?? '', leftOut: 0 });
	if (!(await overlapRuns.rename(access, params.run, form.value.label))) error(404, NOT_FOUND);
	redirect(303, `/studies/${params.study}/overlaps/${params.run}`);
}

export async function removeRun({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'delete', { overlapRun: params.run });
	if (!(await overlapRuns.remove(access, params.run))) error(404, NOT_FOUND);
	redirect(303, `/studies/${params.study}/materials?deleted=${params.run}`);
}

/** Writes the decisions that the page proposed; what is proposed is found again, so that it fits the names as they are now. */
export async function leaveOutForGaps({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const run = await overlapRuns.find(access, params.run);
	if (run === null) error(404, NOT_FOUND);
	const pairs = (await names.matching(access, { overlapRun: run.id }))?.pairs ?? [];
	const inUse = pairs.length < 2 ? run.species : pairs.map(({ species }) => species);
	const leaveOut = gapProposal(matrixOf(run), inUse)?.leaveOut ?? [];
	const why = `pairs without a value in “${run.label}”`;
	await names.decide(
		access,
		leaveOut.map((from) => ({ from, to: null, why }))
	);
	return { label: '', fault: '', leftOut: leaveOut.length };
}
