import { and, eq, isNull } from 'drizzle-orm';
import type { Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { covariates, nicheTables, overlapRuns, treeSets } from '#lib/server/db/schema.ts';
import { analysisHash, decisionsFor, nichesOf } from './analysisInputs.ts';
import type { ListedAnalysis } from './analysisRows.ts';
import { canonicalJson } from './analysisHash.ts';
import * as kept from './covariates.ts';
import * as names from './names.ts';
import * as runs from './overlapRuns.ts';
import * as trees from './treeSets.ts';
import { within } from './scope.ts';

/** What has changed since an analysis was asked for. The result stays as it is; the person may want to run it again. */
export type Change = {
	readonly code:
		| 'tree-set-replaced'
		| 'tree-set-deleted'
		| 'overlap-run-replaced'
		| 'overlap-run-deleted'
		| 'covariate-replaced'
		| 'covariate-deleted'
		| 'niche-table-replaced'
		| 'niche-table-deleted'
		| 'material-read-again'
		| 'names-changed';
	readonly message: string;
};

type Used = Pick<ListedAnalysis, 'treeSetId' | 'overlapRunId' | 'plan' | 'hash' | 'decisions'>;

/** Empty when everything it used still stands. */
export async function outOfDate(access: Access, analysis: Used): Promise<Change[]> {
	const treeSet = await trees.findKept(access, analysis.treeSetId);
	const run = await runs.findKept(access, analysis.overlapRunId);
	if (treeSet === null || run === null) throw new Error('Expected the materials of the analysis; one is not there.');
	const niches = await nichesOf(access, analysis.plan);
	const allowed = await kept.keptOf(access, analysis.plan.covariates);
	const changes: Change[] = [];
	if (treeSet.deletedAt !== null) changes.push(await lostTreeSet(access, treeSet));
	if (run.deletedAt !== null) changes.push(await lostRun(access, run));
	for (const covariate of allowed) if (covariate.deletedAt !== null) changes.push(await lostCovariate(access, covariate));
	if (niches?.deletedAt) changes.push(await lostNicheTable(access, niches));
	if (analysisHash(analysis.plan, { treeSet, run, niches, covariates: allowed }, analysis.decisions) !== analysis.hash) {
		changes.push({
			code: 'material-read-again',
			message: 'A remark about the tree or the matrix was settled, or what is known of the tree was told, in another way since.'
		});
	}
	const decisions = decisionsFor({ run, niches, covariates: allowed }, await names.current(access));
	if (canonicalJson(decisions) !== canonicalJson(analysis.decisions)) {
		changes.push({ code: 'names-changed', message: 'Decisions about names have changed since.' });
	}
	return changes;
}

async function lostTreeSet(access: Access, { id, label }: { id: string; label: string }): Promise<Change> {
	const newer = await db()
		.select({ label: treeSets.label })
		.from(treeSets)
		.where(and(within(access, treeSets.studyId), eq(treeSets.replaces, id), isNull(treeSets.deletedAt)));
	return newer[0] === undefined
		? { code: 'tree-set-deleted', message: `The tree set “${label}” was deleted since.` }
		: { code: 'tree-set-replaced', message: replacedSince('tree set', label, newer[0].label) };
}

async function lostRun(access: Access, { id, label }: { id: string; label: string }): Promise<Change> {
	const newer = await db()
		.select({ label: overlapRuns.label })
		.from(overlapRuns)
		.where(and(within(access, overlapRuns.studyId), eq(overlapRuns.replaces, id), isNull(overlapRuns.deletedAt)));
	return newer[0] === undefined
		? { code: 'overlap-run-deleted', message: `The overlap run “${label}” was deleted since.` }
		: { code: 'overlap-run-replaced', message: replacedSince('overlap run', label, newer[0].label) };
}

async function lostCovariate(access: Access, { id, label }: { id: string; label: string }): Promise<Change> {
	const newer = await db()
		.select({ label: covariates.label })
		.from(covariates)
		.where(and(within(access, covariates.studyId), eq(covariates.replaces, id), isNull(covariates.deletedAt)));
	return newer[0] === undefined
		? { code: 'covariate-deleted', message: `The covariate “${label}” was deleted since.` }
		: { code: 'covariate-replaced', message: replacedSince('covariate', label, newer[0].label) };
}

async function lostNicheTable(access: Access, { id, label }: { id: string; label: string }): Promise<Change> {
	const newer = await db()
		.select({ label: nicheTables.label })
		.from(nicheTables)
		.where(and(within(access, nicheTables.studyId), eq(nicheTables.replaces, id), isNull(nicheTables.deletedAt)));
	return newer[0] === undefined
		? { code: 'niche-table-deleted', message: `The niche table “${label}” was deleted since.` }
		: { code: 'niche-table-replaced', message: replacedSince('niche table', label, newer[0].label) };
}

function replacedSince(what: string, label: string, newer: string): string {
	return label === newer
		? `The ${what} “${label}” was replaced since.`
		: `The ${what} “${label}” was replaced by “${newer}” since.`;
}
