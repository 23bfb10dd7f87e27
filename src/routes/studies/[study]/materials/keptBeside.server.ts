import type { MaterialKind, MaterialName } from '#lib/contracts/materialForms.ts';
import type { Access } from '#lib/server/access.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';

/** What a study holds already, as far as it bears on a text that is looked at. */
export type KeptBeside = {
	/** labels in use by kind, without the one that makes room */
	readonly taken: Readonly<Record<MaterialKind, readonly string[]>>;
	/** the material that the text shall replace; what was answered about it is proposed again */
	readonly former: { readonly label: string; readonly measure?: string; readonly ageUnit?: string } | null;
};

export async function keptBeside(access: Access, replaces: MaterialName | null): Promise<KeptBeside> {
	const [trees, runs] = [await treeSets.list(access), await overlapRuns.list(access)];
	const allowed = await covariates.list(access);
	const tables = await nicheTables.list(access);
	const labelsOf = (kept: readonly { id: string; label: string }[]) =>
		kept.filter(({ id }) => id !== replaces?.id).map(({ label }) => label);
	const tree = replaces?.kind === 'trees' ? trees.find(({ id }) => id === replaces.id) : undefined;
	const run = replaces?.kind === 'matrix' ? runs.find(({ id }) => id === replaces.id) : undefined;
	const formerTree = tree === undefined ? null : { label: tree.label, ageUnit: tree.ageUnit };
	const covariate = replaces?.kind === 'covariate' ? allowed.find(({ id }) => id === replaces.id) : undefined;
	const formerCovariate = covariate === undefined ? null : { label: covariate.label };
	const table = replaces?.kind === 'niches' ? tables.find(({ id }) => id === replaces.id) : undefined;
	const formerTable = table === undefined ? null : { label: table.label };
	const formerRun = run === undefined ? null : { label: run.label, measure: run.measure };
	return {
		taken: { trees: labelsOf(trees), matrix: labelsOf(runs), covariate: labelsOf(allowed), niches: labelsOf(tables) },
		former: formerTree ?? formerRun ?? formerCovariate ?? formerTable
	};
}
