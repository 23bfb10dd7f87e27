import { randomInt } from 'node:crypto';
import type { AnalysisStatus } from '#lib/contracts/materials.ts';
import { SEED_LIMIT, type Plan, type PlanRequest } from '#lib/contracts/plan.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { Access } from '#lib/server/access.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import { enqueueAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { analysisHash, computeArgument, decisionsFor, type Materials } from '#lib/server/repositories/analysisInputs.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { covariatesOf } from './covariatesOf.ts';
import { nicheTableOf } from './nicheTableOf.ts';
import { notInStudy } from './notInStudy.ts';
import { Refusal } from './refusal.ts';

export type Started = {
	readonly id: string;
	readonly status: AnalysisStatus;
	/** what was noticed before it runs; empty when an equal one was there already */
	readonly remarks: readonly Remark[];
};

/**
 * Writes a plan down and queues it, unless an equal one on equal inputs waits, works or has finished already.
 *
 * @throws {Refusal} 404 for a material that is not in the study; 422 when a choice is open
 * @throws {InputError} when the data do not allow the test
 */
export async function startAnalysis(access: Access, request: PlanRequest): Promise<Started> {
	const checked = await checkedPlan(access, request);
	if ('status' in checked) return checked;
	const { id, status, isNew } = await analyses.create(access, checked.written);
	if (isNew) await enqueueAnalysis(id);
	return { id, status, remarks: checked.remarks };
}

/** Writes a plan down with the time and leaves it to be run later; otherwise as `startAnalysis`, and it refuses the same. */
export async function declareAnalysis(access: Access, request: PlanRequest): Promise<Started> {
	const checked = await checkedPlan(access, request);
	if ('status' in checked) return checked;
	const { id, status } = await analyses.declare(access, checked.written);
	return { id, status, remarks: checked.remarks };
}

type Checked = { readonly written: analyses.NewAnalysis; readonly remarks: readonly Remark[] };

/** The plan, ready to be written down; or the equal one that waits, works or has finished. */
async function checkedPlan(access: Access, request: PlanRequest): Promise<Started | Checked> {
	const materials = await materialsOf(access, request);
	const plan = completePlan(request, materials);
	const decisions = decisionsFor(materials, await names.current(access));
	const hash = analysisHash(plan, materials, decisions);
	const held = await analyses.findByHash(access, hash);
	const isDone = held !== null && held.deletedAt === null && !['stopped', 'failed'].includes(held.status);
	if (isDone) return { id: held.id, status: held.status, remarks: [] };
	refuseOpenRemarks(materials);
	const { remarks } = await compute('preview', await computeArgument(plan, materials, decisions));
	return { written: { plan, hash, decisions }, remarks };
}

async function materialsOf(
	access: Access,
	{ treeSet: treeSetId, overlapRun, covariates: allowedFor, signal }: PlanRequest
): Promise<Materials> {
	const treeSet = await treeSets.find(access, treeSetId);
	if (treeSet === null) throw notInStudy('tree set', treeSetId);
	const run = await overlapRuns.find(access, overlapRun);
	if (run === null) throw notInStudy('overlap run', overlapRun);
	const allowed = await covariatesOf(access, allowedFor);
	return { treeSet, run, covariates: allowed, niches: signal === null ? null : await nicheTableOf(access, signal.table) };
}

/** The plan as it is stored: every default written out, the seed drawn. */
function completePlan(request: PlanRequest, { treeSet, niches }: Materials): Plan {
	refuseLater(request);
	const tree = request.tree ?? (treeSet.treeCount === 1 ? 0 : 'all');
	if (tree !== 'all' && tree >= treeSet.treeCount) throw noSuchTree(tree, treeSet.treeCount);
	const index = treeSet.treeCount === 1 ? 0 : tree;
	const signal = request.signal === null || !niches ? null : { ...request.signal, table: niches.id };
	return { ...request, tree: index, signal, seed: request.seed ?? randomInt(SEED_LIMIT + 1) };
}

export function noSuchTree(index: number, count: number): Refusal {
	return new Refusal(
		422,
		'no-such-tree',
		`Expected \`tree\` to be from 0 to ${count - 1}; got ${index}. The set holds ${count}.`
	);
}

/** A block that would be missing from the result is refused, so that nobody takes its absence for an answer. */
function refuseLater({ robustness }: PlanRequest): void {
	if (robustness === null) return;
	throw new Refusal(
		422,
		'not-offered-yet',
		'`robustness` is not offered yet. Leave it out, or give null, to run the rest of the plan.'
	);
}

/** What is open about the matrix and the tree is listed at once, so that nobody settles one thing to meet the next. */
function refuseOpenRemarks({ treeSet, run }: Materials): void {
	// A set keeps the remarks on all of its trees; which of several can be used is found when the chosen one is read.
	const isOneTree = treeSet.treeCount === 1 && treeSet.chosen.burnIn === 0 && treeSet.chosen.thin === 1;
	const ofTree = isOneTree ? treeSet.remarks : [];
	const open = [...ofTree, ...run.remarks].filter((remark) => remark.level === 'settle');
	const first = open[0];
	if (first === undefined) return;
	const more = open.length > 1 ? ` (${open.length - 1} more: see \`remarks\`)` : '';
	throw new Refusal(422, first.code, `Something must be settled before this can be tested: ${first.message}${more}`, {
		remarks: open
	});
}
