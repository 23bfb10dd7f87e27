import { error, fail, redirect } from '@sveltejs/kit';
import { startAnalysis } from '#lib/server/api/startAnalysis.ts';
import { stopAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { attempt } from '../attempt.server.ts';
import { inForce } from '../inForce.server.ts';
import type { RequestEvent } from './$types';

const NOT_FOUND = 'No analysis at this address, or it is not yours to see.';

export async function stopRunning({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'run', { study: params.study });
	// Only what still waits or works can be stopped; asking again, or too late, changes nothing.
	if (await analyses.markStopped(access, params.analysis)) await stopAnalysis(params.analysis);
}

/** The same plan once more, on the materials and names that stand now. */
export async function runAgain({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'run', { study: params.study });
	const analysis = await analyses.find(access, params.analysis);
	if (!analysis) error(404, NOT_FOUND);
	const request = { ...analysis.plan, ...(await inForce(access, analysis)) };
	const outcome = await attempt(() => startAnalysis(access, request));
	if ('message' in outcome) return fail(422, { refused: outcome });
	redirect(303, `/studies/${params.study}/analyses/${outcome.id}`);
}

export async function removeAnalysis({ params, locals }: RequestEvent) {
	const access = await can(locals.user, 'delete', { analysis: params.analysis });
	if (!(await analyses.remove(access, params.analysis))) error(404, NOT_FOUND);
	redirect(303, `/studies/${params.study}/analyses?deleted=${params.analysis}`);
}
