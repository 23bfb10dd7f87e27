import type { Plan } from '#lib/contracts/plan.ts';

type Material = { readonly id: string; readonly replaces: string | null; readonly deletedAt: string | null };
type Asked = { readonly id: string; readonly plan: Plan };

/** A plan that names a replaced material, and the same plan with what took its place. */
export type Stale = {
	readonly id: string;
	readonly renewed: Plan;
	/** ids of the materials that took another’s place in it */
	readonly through: readonly string[];
};

/**
 * Analyses that ran on a material which another has replaced since, unless the same was run on the new one already. Where
 * the new one is gone as well there is nothing to run on, and the analysis is not listed.
 *
 * @param materials - kept and deleted ones of the study
 */
export function staleAnalyses(asked: readonly Asked[], materials: readonly Material[]): Stale[] {
	const heirs = new Map(materials.flatMap(({ id, replaces }) => (replaces === null ? [] : [[replaces, id] as const])));
	const kept = new Set(materials.filter(({ deletedAt }) => deletedAt === null).map(({ id }) => id));
	const known = new Set(asked.map(({ plan }) => keyOf(plan)));
	return asked.flatMap(({ id, plan }) => {
		const renewed = {
			...plan,
			treeSet: lastHeir(heirs, plan.treeSet),
			overlapRun: lastHeir(heirs, plan.overlapRun),
			covariates: plan.covariates.map((covariate) => lastHeir(heirs, covariate)),
			signal: plan.signal?.table === undefined ? plan.signal : { ...plan.signal, table: lastHeir(heirs, plan.signal.table) }
		};
		const before = materialsOf(plan);
		const through = materialsOf(renewed).filter((material) => !before.includes(material));
		const isWhole = materialsOf(renewed).every((material) => kept.has(material));
		if (through.length === 0 || !isWhole || known.has(keyOf(renewed))) return [];
		return [{ id, renewed, through }];
	});
}

function materialsOf({ treeSet, overlapRun, covariates, signal }: Plan): string[] {
	return [treeSet, overlapRun, ...covariates, ...(signal?.table === undefined ? [] : [signal.table])];
}

function lastHeir(heirs: ReadonlyMap<string, string>, id: string): string {
	let last = id;
	for (let next = heirs.get(last); next !== undefined; next = heirs.get(last)) last = next;
	return last;
}

function keyOf(plan: Plan): string {
	return JSON.stringify(Object.entries(plan).sort(([a], [b]) => (a < b ? -1 : 1)));
}
