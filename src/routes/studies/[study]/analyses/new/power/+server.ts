import { json } from '@sveltejs/kit';
import { planPowerSentence } from '#lib/analysis/words/curveSentences.ts';
import { planForm } from '#lib/contracts/planForm.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import { can } from '#lib/server/permissions.ts';
import { computeArgument, decisionsFor } from '#lib/server/repositories/analysisInputs.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { Access } from '#lib/server/access.ts';
import type { RequestHandler } from './$types';

/** What the plan in the address could detect on its tree, as a sentence; null where the plan page already says why not. */
export const GET: RequestHandler = async ({ params, url, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const parsed = planForm.safeParse(Object.fromEntries(url.searchParams));
	const plan = parsed.success ? planSchema.parse({ ...parsed.data, covariates: [], signal: null, clades: null }) : null;
	return json({ sentence: plan === null ? null : await sentenceFor(access, plan) });
};

async function sentenceFor(access: Access, plan: ReturnType<typeof planSchema.parse>): Promise<string | null> {
	const treeSet = await treeSets.find(access, plan.treeSet);
	const run = await overlapRuns.find(access, plan.overlapRun);
	if (treeSet === null || run === null || Number(plan.tree) >= treeSet.treeCount) return null;
	const decisions = decisionsFor({ run }, await names.current(access));
	try {
		const power = await compute('planPower', await computeArgument(plan, { treeSet, run }, decisions));
		return power === null ? null : planPowerSentence(power, plan.statistic);
	} catch (thrown) {
		if (thrown instanceof InputError) return null;
		throw thrown;
	}
}
