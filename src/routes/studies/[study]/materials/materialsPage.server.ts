import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import type { MaterialKind, MaterialName } from '#lib/contracts/materialForms.ts';
import { NOTHING_KNOWN } from '#lib/contracts/treeAbout.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { Access } from '#lib/server/access.ts';
import { deletionOf, restorable, type Deletion } from '#lib/server/deletion.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import type { ListedCovariate } from '#lib/server/repositories/covariateRows.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import type { KeptNicheTable } from '#lib/server/repositories/nicheTableRows.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import type { ListedRun } from '#lib/server/repositories/overlapRunRows.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { tinyWing } from '../tinyWing.ts';
import { drawTreeSet } from './drawTree.server.ts';
import { counted, treeFactWords, treeKindWords } from './materialWords.ts';
import { covariateFactWords } from './covariateWords.ts';
import { nicheFactWords } from './nicheWords.ts';
import { covariateSettleQuestions, matrixSettleQuestions, treeSettleQuestions } from './questions.ts';
import { staleAnalyses } from './staleAnalyses.ts';
import { printedFormRemark } from './printedForm.server.ts';

/** What is kept of a study, what was deleted, and what rests on a material that was replaced. */
export async function materialsPage(access: Access) {
	const [trees, runs] = [await treeSets.list(access), await overlapRuns.list(access)];
	const allowed = await covariates.list(access);
	const tables = await nicheTables.list(access);
	const gone = [
		...(await treeSets.listDeleted(access)),
		...(await overlapRuns.listDeleted(access)),
		...(await covariates.listDeleted(access)),
		...(await nicheTables.listDeleted(access))
	];
	const asked = await analyses.list(access);
	const stale = staleAnalyses(asked, [...trees, ...runs, ...allowed, ...tables, ...gone]);
	const usedBy = (id: string) => asked.filter(({ plan }) => usesMaterial(plan, id)).length;
	const uses: Uses = {
		usedBy,
		staleFor: (id) => stale.filter(({ through }) => through.includes(id)).length,
		deletion: (id, createdBy) => deletionOf(access, { createdBy, isUsed: usedBy(id) > 0 })
	};
	const printed = await printedFormRemark(access, runs);
	const drawable = await openings.drawable(access, runs);
	return {
		trees: await Promise.all(trees.map((set) => keptTree(set, uses))),
		runs: await Promise.all(runs.map((run) => keptRun(access, run, { ...uses, order: trees[0]?.tips ?? [], printed, drawable }))),
		nicheTables: tables.map((table) => keptNicheTable(table, uses)),
		covariates: allowed.map((covariate) => keptCovariate(covariate, uses)),
		deleted: restorable(access, gone).map((material) => goneLine(material, [...trees, ...runs, ...allowed, ...tables]))
	};
}

export type KeptMaterial = Awaited<ReturnType<typeof materialsPage>>['trees' | 'runs' | 'covariates' | 'nicheTables'][number];

function usesMaterial({ treeSet, overlapRun, covariates: allowed, signal }: Plan, id: string): boolean {
	return treeSet === id || overlapRun === id || allowed.includes(id) || signal?.table === id;
}

type Uses = {
	readonly usedBy: (id: string) => number;
	readonly staleFor: (id: string) => number;
	readonly deletion: (id: string, createdBy: string) => Deletion;
};

async function keptTree(set: TreeSet, { usedBy, staleFor, deletion }: Uses) {
	const { id, label, kind, treeCount, createdAt, remarks } = set;
	return {
		...{ kind: 'trees' as const, id, label, at: createdAt, remarks: pageRemarks(remarks) },
		facts: [treeKindWords(kind, treeCount), ...treeFactWords(set)],
		...{ usedBy: usedBy(id), stale: staleFor(id), deletion: deletion(id, set.createdBy) },
		questions: treeSettleQuestions(remarks, {}),
		drawing: await drawTreeSet(set),
		wing: null,
		about: set.about ?? NOTHING_KNOWN,
		offersCorrection: false
	};
}

type RunFrame = Uses & {
	readonly order: readonly string[];
	readonly printed: { readonly run: string; readonly remark: Remark } | null;
	/** runs that may be drawn before they are opened */
	readonly drawable: ReadonlySet<string>;
};

async function keptRun(access: Access, run: ListedRun, { usedBy, staleFor, deletion, order, printed, drawable }: RunFrame) {
	const { id, label, measure, createdAt, species } = run;
	const remarks = printed?.run === id ? [printed.remark, ...run.remarks] : run.remarks;
	const whole = await overlapRuns.find(access, id);
	return {
		...{ kind: 'matrix' as const, id, label, at: createdAt, remarks: pageRemarks(remarks) },
		facts: [
			measure === 'other' ? 'another measure of overlap' : MEASURE_NAMES[measure],
			counted(species.length, 'species', 'species'),
			missingWords(whole?.lower)
		],
		...{ usedBy: usedBy(id), stale: staleFor(id), deletion: deletion(id, run.createdBy) },
		questions: matrixSettleQuestions(run.remarks, {}).filter(({ isOpen }) => isOpen),
		drawing: null,
		wing: whole === null || !drawable.has(id) ? null : tinyWing(whole, order),
		about: null,
		offersCorrection: printed?.run === id && printed.remark.code === 'uncorrected-i'
	};
}

function keptCovariate(covariate: ListedCovariate, { usedBy, staleFor, deletion }: Uses) {
	const { id, label, createdAt, createdBy, species, remarks } = covariate;
	return {
		...{ kind: 'covariate' as const, id, label, at: createdAt, remarks: pageRemarks(remarks) },
		facts: covariateFactWords(species.length, covariate),
		...{ usedBy: usedBy(id), stale: staleFor(id), deletion: deletion(id, createdBy) },
		questions: covariateSettleQuestions(remarks, {}),
		...{ drawing: null, wing: null, about: null, offersCorrection: false }
	};
}

function keptNicheTable(table: KeptNicheTable, { usedBy, staleFor, deletion }: Uses) {
	const { id, label, createdAt, createdBy, species, variables, remarks } = table;
	return {
		...{ kind: 'niches' as const, id, label, at: createdAt, remarks: pageRemarks(remarks) },
		facts: [counted(species.length, 'species', 'species'), ...nicheFactWords(variables)],
		...{ usedBy: usedBy(id), stale: staleFor(id), deletion: deletion(id, createdBy), questions: [] },
		...{ drawing: null, wing: null, about: null, offersCorrection: false }
	};
}

function missingWords(lower: Float64Array = new Float64Array()): string {
	let missing = 0;
	for (const value of lower) if (Number.isNaN(value)) missing += 1;
	return missing === 0
		? counted(lower.length, 'pair', 'pairs')
		: `${counted(missing, 'pair', 'pairs')} missing of ${counted(lower.length, 'pair', 'pairs')}`;
}

type Listed = TreeSet | ListedRun | ListedCovariate | KeptNicheTable;

function kindOf(material: Listed): MaterialKind {
	if ('tips' in material) return 'trees';
	if ('measure' in material) return 'matrix';
	return 'variables' in material ? 'niches' : 'covariate';
}

function goneLine(material: Listed, kept: readonly Listed[]) {
	const kind = kindOf(material);
	const heir = kept.find(({ replaces }) => replaces === material.id);
	return {
		kind,
		id: material.id,
		label: material.label,
		at: material.deletedAt ?? material.createdAt,
		replacedBy: heir?.label ?? null
	};
}

/** The material a new text shall replace, as the address names it. */
export async function replacing(access: Access, name: MaterialName | null) {
	if (name === null) return null;
	const found = await named(access, name);
	return found === null || found.deletedAt !== null ? null : { ...name, label: found.label };
}

function named(access: Access, { kind, id }: MaterialName) {
	if (kind === 'trees') return treeSets.find(access, id);
	if (kind === 'matrix') return overlapRuns.findListed(access, id);
	return kind === 'covariate' ? covariates.find(access, id) : nicheTables.find(access, id);
}
