import { eq, and } from 'drizzle-orm';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses } from '#lib/server/db/schema.ts';
import { createHash } from 'node:crypto';
import { canonicalHash } from './analysisHash.ts';
import type { NameDecision } from './names.ts';
import type { UsedDecision } from './analysisRows.ts';
import { bytesOf, type OverlapRun } from './overlapRunRows.ts';
import * as overlapRuns from './overlapRuns.ts';
import { within } from './scope.ts';
import * as texts from './texts.ts';
import { treeInText, type TreeSet } from './treeSetRows.ts';
import * as treeSets from './treeSets.ts';

export type Materials = { readonly treeSet: TreeSet; readonly run: OverlapRun };

/** What a compute thread is given. The tree of the plan is counted in the text, not in the chosen trees of the set. */
export type ComputeArgument = { readonly inputs: AnalysisInputs; readonly plan: Plan };

/**
 * The decisions that can touch a run, in a fixed order: those about names it holds, and every name left out, since that
 * may be a tip of the tree.
 */
export function decisionsFor(run: Pick<OverlapRun, 'species'>, decisions: readonly NameDecision[]): UsedDecision[] {
	const held = new Set(run.species);
	return decisions
		.filter(({ from, to }) => held.has(from) || to === null)
		.map(({ from, to, why }) => ({ from, to, ...(why === '' ? {} : { why }) }))
		.sort((a, b) => (a.from < b.from ? -1 : 1));
}

/** What makes an analysis the one it is: the plan and every input it runs on. */
export function analysisHash(plan: Plan, { treeSet, run }: Materials, decisions: readonly UsedDecision[]): string {
	const { textHash, ageUnit, spreadConfirmed, chosen } = treeSet;
	const { species, measure, lower } = run;
	const values = createHash('sha256').update(bytesOf(lower)).digest('hex');
	return canonicalHash({
		plan,
		trees: { textHash, ageUnit, spreadConfirmed, chosen },
		overlap: { species, measure, values },
		decisions
	});
}

export async function computeArgument(
	plan: Plan,
	{ treeSet, run }: Materials,
	decisions: readonly UsedDecision[]
): Promise<ComputeArgument> {
	const { species, lower, remarks, measure } = run;
	const { ageUnit, spreadConfirmed, chosen } = treeSet;
	const tree = plan.tree === 'all' ? plan.tree : treeInText(chosen, plan.tree);
	const treeText = await texts.load(treeSet.textHash);
	return {
		inputs: { treeText, ageUnit, spreadConfirmed, measure, overlap: { species, lower, remarks }, decisions },
		plan: { ...plan, tree }
	};
}

/**
 * Everything a stored analysis runs on. Materials deleted since are still read.
 * @throws {Error} when it is not there: a defect of ours
 */
export async function inputsOf(access: Access, id: string): Promise<ComputeArgument> {
	const rows = await db()
		.select({
			plan: analyses.plan,
			decisions: analyses.decisions,
			treeSetId: analyses.treeSetId,
			overlapRunId: analyses.overlapRunId
		})
		.from(analyses)
		.where(and(eq(analyses.id, id), within(access, analyses.studyId)))
		.limit(1);
	const row = rows[0];
	if (row === undefined) throw new Error(`Expected the analysis ${id}; it is not there.`);
	const treeSet = await treeSets.findKept(access, row.treeSetId);
	const run = await overlapRuns.findKept(access, row.overlapRunId);
	if (treeSet === null || run === null) throw new Error(`Expected the materials of analysis ${id}; one is not there.`);
	return computeArgument(row.plan, { treeSet, run }, row.decisions);
}
