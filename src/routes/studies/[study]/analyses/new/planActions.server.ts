import { fail, redirect } from '@sveltejs/kit';
import { planForm } from '#lib/contracts/planForm.ts';
import type { PlanRequest } from '#lib/contracts/plan.ts';
import type { Access } from '#lib/server/access.ts';
import { declareAnalysis, startAnalysis, type Started } from '#lib/server/api/startAnalysis.ts';
import { fieldsOf, parseForm } from '#lib/server/parseForm.ts';
import { can } from '#lib/server/permissions.ts';
import { attempt } from '../attempt.server.ts';
import type { RequestEvent } from './$types';

type Begin = (access: Access, request: PlanRequest) => Promise<Started>;

export const runPlan = (event: RequestEvent) => begin(event, startAnalysis);
export const declarePlan = (event: RequestEvent) => begin(event, declareAnalysis);

async function begin({ params, request, locals }: RequestEvent, act: Begin) {
	const access = await can(locals.user, 'run', { study: params.study });
	const typed = await request.clone().formData();
	const form = await parseForm(request, planForm);
	const values = fieldsOf(typed);
	if (!form.ok) return fail(400, { values, faults: form.faults, refused: null });
	const outcome = await attempt(() => act(access, form.value));
	if ('message' in outcome) return fail(422, { values, faults: {}, refused: outcome });
	redirect(303, `/studies/${params.study}/analyses/${outcome.id}`);
}
