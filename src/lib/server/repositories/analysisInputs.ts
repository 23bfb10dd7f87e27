import { eq, and } from 'drizzle-orm';
import type { AnalysisInputs, CovariateInput } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { NOTHING_KNOWN } from '#lib/contracts/treeAbout.ts';
import type { Access } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses } from '#lib/server/db/schema.ts';
import { createHash } from 'node:crypto';
import { canonicalHash } from './analysisHash.ts';
import type { Covariate } from './covariateRows.ts';
import * as covariates from './covariates.ts';
import type { NameDecision } from './names.ts';
import type { UsedDecision } from './analysisRows.ts';
import { storedVariable, type KeptNicheTable } from './nicheTableRows.ts';
import * as nicheTables from './nicheTables.ts';
import { bytesOf, type OverlapRun } from './overlapRunRows.ts';
import * as overlapRuns from './overlapRuns.ts';
import { within } from './scope.ts';
import * as texts from './texts.ts';
import { treeInText, type TreeSet } from './treeSetRows.ts';
import * as treeSets from './treeSets.ts';

export type Materials = {
	readonly treeSet: TreeSet;
	readonly run: OverlapRun;
	/** when the plan asks for signal in niche positions */
	readonly niches?: KeptNicheTable | null;
	/** what the plan allows for, in its order */
	readonly covariates?: readonly Covariate[];
};

/** What a compute thread is given. The tree of the plan is counted in the text, not in the chosen trees of the set. */
export type ComputeArgument = { readonly inputs: AnalysisInputs; readonly plan: Plan };

/** Materials whose names decisions are about. */
type NamedMaterials = {
	readonly run: Pick<OverlapRun, 'species'>;
	readonly niches?: Pick<KeptNicheTable, 'species'> | null;
	readonly covariates?: readonly Pick<Covariate, 'species'>[];
};

/**
 * The decisions that can touch what is compared, in a fixed order: those about names it holds, and every name left out, since that
 * may be a tip of the tree.
 */
export function decisionsFor(
	{ run, niches, covariates = [] }: NamedMaterials,
	decisions: readonly NameDecision[]
): UsedDecision[] {
	const held = new Set([run.species, niches?.species ?? [], ...covariates.map(({ species }) => species)].flat());
	return decisions
		.filter(({ from, to }) => held.has(from) || to === null)
		.map(({ from, to, why }) => ({ from, to, ...(why === '' ? {} : { why }) }))
		.sort((a, b) => (a.from < b.from ? -1 : 1));
}

/** What makes an analysis the one it is: the plan and every input it runs on. */
export function analysisHash(
	plan: Plan,
	{ treeSet, run, niches, covariates = [] }: Materials,
	decisions: readonly UsedDecision[]
): string {
	const { textHash, ageUnit, spreadConfirmed, chosen, about } = treeSet;
	const { species, measure, lower } = run;
	const values = valuesHash(lower);
	return canonicalHash({
		plan,
		trees: { textHash, ageUnit, spreadConfirmed, chosen, ...(about === null ? {} : { about }) },
		overlap: { species, measure, values },
		...(niches ? { niches: { species: niches.species, variables: niches.variables.map(storedVariable) } } : {}),
		...(covariates.length > 0 ? { covariates: covariates.map(covariateIdentity) } : {}),
		decisions
	});
}

function valuesHash(lower: Float64Array): string {
	return createHash('sha256').update(bytesOf(lower)).digest('hex');
}

/** The scale is in the values. */
function covariateIdentity({ species, lower }: Covariate) {
	return { species, values: valuesHash(lower) };
}

function covariateInput({ label, species, lower, remarks, reading: { kind, scale } }: Covariate): CovariateInput {
	return { label, species, lower, remarks, kind, scale };
}

export async function computeArgument(
	plan: Plan,
	{ treeSet, run, niches, covariates = [] }: Materials,
	decisions: readonly UsedDecision[]
): Promise<ComputeArgument> {
	const { species, lower, remarks, measure } = run;
	const { ageUnit, spreadConfirmed, chosen, about } = treeSet;
	const tree = plan.tree === 'all' ? plan.tree : treeInText(chosen, plan.tree);
	const treeText = await texts.load(treeSet.textHash);
	return {
		inputs: {
			treeText,
			ageUnit,
			spreadConfirmed,
			chosen,
			about: about ?? NOTHING_KNOWN,
			measure,
			overlap: { species, lower, remarks },
			decisions,
			...(covariates.length > 0 ? { covariates: covariates.map(covariateInput) } : {}),
			...(niches ? { niches: { label: niches.label, species: niches.species, variables: niches.variables } } : {})
		},
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
	const niches = await nichesOf(access, row.plan);
	const allowed = await covariates.keptOf(access, row.plan.covariates);
	return computeArgument(row.plan, { treeSet, run, niches, covariates: allowed }, row.decisions);
}

/**
 * The niche table of a stored plan, deleted ones too; null when the plan asks for no signal.
 * @throws {Error} when it is not there: a defect of ours
 */
export async function nichesOf(access: Access, { signal }: Plan): Promise<KeptNicheTable | null> {
	if (signal?.table === undefined) return null;
	const table = await nicheTables.findKept(access, signal.table);
	if (table === null) throw new Error(`Expected the niche table ${signal.table}; it is not there.`);
	return table;
}
