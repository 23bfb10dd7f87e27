import { pageWords } from '#lib/analysis/words/pageWords.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Access } from '#lib/server/access.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import { startAnalysis } from '#lib/server/api/startAnalysis.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { inForce } from './inForce.server.ts';
import { renewals, type Renewal } from './renewals.ts';

/** Every analysis of the study that was run again, with the run before it. */
export async function findRenewals(access: Access, asked: readonly analyses.ListedAnalysis[]): Promise<Renewal[]> {
	const materials = [
		await treeSets.list(access),
		await treeSets.listDeleted(access),
		await overlapRuns.list(access),
		await overlapRuns.listDeleted(access),
		await covariates.list(access),
		await covariates.listDeleted(access),
		await nicheTables.list(access),
		await nicheTables.listDeleted(access)
	];
	return renewals(asked, materials.flat());
}

type NotRun = { readonly title: string; readonly message: string };

/**
 * Runs every finished analysis again whose materials or names have changed, unless that was done already.
 * @returns those that could not be run, with the sentence why
 */
export async function runStale(access: Access): Promise<NotRun[]> {
	const asked = await analyses.list(access);
	const renewed = new Set((await findRenewals(access, asked)).map(({ before }) => before));
	const notRun: NotRun[] = [];
	for (const one of asked.filter(({ id, status }) => status === 'finished' && !renewed.has(id))) {
		if ((await analyses.outOfDate(access, one)).length === 0) continue;
		const message = await renew(access, one);
		if (message !== null) notRun.push({ title: one.headline?.title ?? 'An analysis', message });
	}
	return notRun;
}

/** @returns the sentence of a refusal, null when it waits to run */
async function renew(access: Access, one: analyses.ListedAnalysis): Promise<string | null> {
	try {
		await startAnalysis(access, { ...one.plan, ...(await inForce(access, one)) });
		return null;
	} catch (thrown) {
		if (thrown instanceof InputError || thrown instanceof Refusal) return pageWords(thrown.message);
		throw thrown;
	}
}
