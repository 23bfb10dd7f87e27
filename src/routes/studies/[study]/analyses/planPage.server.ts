import { randomInt } from 'node:crypto';
import { pageRemarks, pageWords } from '#lib/analysis/words/pageWords.ts';
import { PLAN_FIELDS, planForm, planValues, type PlanValues, UNASKED } from '#lib/contracts/planForm.ts';
import { planSchema, type PlanRequest } from '#lib/contracts/plan.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { Access } from '#lib/server/access.ts';
import { compute, ComputeRefusedError } from '#lib/server/jobs/pool.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { covariatesOf } from '#lib/server/api/covariatesOf.ts';
import { nicheTableOf } from '#lib/server/api/nicheTableOf.ts';
import { computeArgument, decisionsFor } from '#lib/server/repositories/analysisInputs.ts';
import * as kept from '#lib/server/repositories/covariates.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { inForce } from './inForce.server.ts';
import { proposedShuffles } from './planWords.ts';
import { cladeSpecies } from './cladeSpecies.ts';

/** Short enough to be read out and typed again; any seed of the plan is as good as another. */
const PROPOSED_SEEDS = 1_000_000;

export type Refused = { readonly code: string; readonly message: string; readonly remarks: readonly Remark[] };

/** Everything the page of a new plan shows. `query` holds what is chosen so far, as the form writes it. */
export async function planPage(access: Access, query: URLSearchParams) {
	const [trees, runs] = [await treeSets.list(access), await overlapRuns.list(access)];
	const materials = {
		trees: trees.map(({ id, label, kind, treeCount, tipCount, rootAge, ageUnit }) => ({
			...{ id, label, kind, treeCount, tipCount, rootAge, ageUnit }
		})),
		runs: runs.map(({ id, label, measure, species, createdAt }) => ({
			id,
			label,
			measure,
			speciesCount: species.length,
			createdAt
		})),
		covariates: (await kept.list(access)).map(({ id, label, reading, species }) => ({
			id,
			label,
			unit: reading.unit,
			scale: reading.scale,
			speciesCount: species.length
		})),
		nicheTables: (await nicheTables.list(access)).map(({ id, label, species, variables }) => ({
			id,
			label,
			speciesCount: species.length,
			variables: variables.map(({ name, role }) => ({ name, role }))
		}))
	};
	const [tree, run] = [trees.find(({ kind }) => kind === 'summary') ?? trees[0], runs[0]];
	if (tree === undefined || run === undefined) return { ...materials, plan: null };
	const base = (await startingValues(access, query)) ?? {
		...{
			treeSet: tree.id,
			tree: 'all',
			overlapRun: run.id,
			species: '',
			statistic: 'slope',
			alternative: 'less',
			transform: 'none'
		},
		...{ alpha: '0.05', permutations: String(proposedShuffles(run.species.length)), seed: String(randomInt(PROPOSED_SEEDS)) },
		...UNASKED
	};
	const values = chosenValues(base, query);
	return {
		...materials,
		plan: {
			values,
			outlook: await outlookOf(access, values),
			context: await openings.contextOf(access, values.overlapRun)
		}
	};
}

/** The plan of an older analysis on the materials that stand now, for all its species or for one of its clades. */
async function startingValues(access: Access, query: URLSearchParams): Promise<PlanValues | null> {
	const from = query.get('from');
	const older = from === null ? null : await analyses.find(access, from);
	if (older === null) return null;
	const values = planValues({ ...older.plan, ...(await inForce(access, older)) });
	const node = query.get('node');
	if (node === null || older.result === null) return values;
	return { ...values, species: cladeSpecies(older.result.plate.tree, Number(node)).join('\n') };
}

function chosenValues(base: PlanValues, query: URLSearchParams): PlanValues {
	const given = PLAN_FIELDS.filter((field) => query.has(field)).map((field) => [field, query.getAll(field).join('\n')]);
	return { ...base, ...Object.fromEntries(given) };
}

/** What the plan could at best say on these materials, or why it cannot be run. */
async function outlookOf(access: Access, values: PlanValues) {
	const parsed = planForm.safeParse(values);
	if (!parsed.success) return { kind: 'faults' as const, faults: faultsOf(parsed.error.issues) };
	try {
		return { kind: 'preview' as const, ...(await previewOf(access, parsed.data)) };
	} catch (thrown) {
		if (thrown instanceof InputError) return { kind: 'refused' as const, ...refusedBy(thrown) };
		throw thrown;
	}
}

async function previewOf(access: Access, request: PlanRequest) {
	const treeSet = await treeSets.find(access, request.treeSet);
	const run = await overlapRuns.find(access, request.overlapRun);
	if (treeSet === null) throw new InputError('no-tree-set', 'The chosen tree is not in this study any more. Choose another.');
	if (run === null) throw new InputError('no-overlap-run', 'The chosen matrix is not in this study any more. Choose another.');
	const plan = planSchema.parse(request);
	if (Number(plan.tree) >= treeSet.treeCount) {
		const trees = treeSet.treeCount === 1 ? 'one tree, tree 0' : `trees 0 to ${treeSet.treeCount - 1}`;
		throw new InputError('no-such-tree', `“${treeSet.label}” holds ${trees}; there is no tree ${plan.tree}.`);
	}
	const niches = plan.signal === null ? null : await nicheTableOf(access, plan.signal.table);
	const covariates = await covariatesOf(access, plan.covariates);
	const materials = { treeSet, run, niches, covariates };
	const decisions = decisionsFor(materials, await names.current(access));
	const { species, ...preview } = await compute('preview', await computeArgument(plan, materials, decisions));
	return { ...preview, speciesCount: species.length, permutations: plan.permutations, ageUnit: treeSet.ageUnit };
}

export function refusedBy(thrown: InputError): Refused {
	const { code, message } = thrown;
	const remarks = thrown instanceof ComputeRefusedError ? thrown.remarks : [];
	// The first remark is the sentence itself; the one on missing pairs lists the names that stand in it.
	const others = remarks.filter((remark) => remark.message !== message && remark.code !== 'missing-pairs');
	return { code, message: pageWords(message), remarks: pageRemarks(others) };
}

export function faultsOf(issues: readonly { readonly path: readonly PropertyKey[]; readonly message: string }[]) {
	const faults: Record<string, string> = {};
	for (const { path, message } of issues) faults[String(path[0] ?? 'form')] ??= message;
	return faults;
}
