import type { Plan } from '#lib/contracts/plan.ts';

type Asked = {
	readonly id: string;
	readonly plan: Plan;
	readonly hash: string;
	readonly status: 'waiting' | 'working' | 'finished' | 'stopped' | 'failed';
	readonly createdAt: string;
};
type Material = { readonly id: string; readonly replaces: string | null };

/** An analysis that was run again on what had changed under it. */
export type Renewal = { readonly before: string; readonly after: string };

/**
 * Every analysis that was run again since, with the run before it; the one asked for last comes first. Two belong together
 * when their plans differ in nothing but materials of one line, each in the place of the one before.
 *
 * @param asked - analyses of the study that are not deleted
 * @param materials - kept and deleted ones of the study
 */
export function renewals(asked: readonly Asked[], materials: readonly Material[]): Renewal[] {
	const replaced = new Map(materials.flatMap(({ id, replaces }) => (replaces === null ? [] : [[id, replaces] as const])));
	const lines = new Map<string, Asked[]>();
	for (const one of asked.filter(({ status }) => status !== 'stopped')) {
		const key = lineOf(one.plan, replaced);
		lines.set(key, [...(lines.get(key) ?? []), one]);
	}
	return [...lines.values()]
		.flatMap((line) => {
			const [after, ...earlier] = line.sort(newestFirst);
			const before = earlier.find(({ status, hash }) => status === 'finished' && hash !== after?.hash);
			return after === undefined || before === undefined ? [] : [{ before, after }];
		})
		.sort((a, b) => newestFirst(a.after, b.after))
		.map(({ before, after }) => ({ before: before.id, after: after.id }));
}

function newestFirst(a: Asked, b: Asked): number {
	return a.createdAt < b.createdAt ? 1 : -1;
}

/** The plan with each material named by the first of its line. */
function lineOf(plan: Plan, replaced: ReadonlyMap<string, string>): string {
	const named = {
		...plan,
		treeSet: first(replaced, plan.treeSet),
		overlapRun: first(replaced, plan.overlapRun),
		covariates: plan.covariates.map((id) => first(replaced, id)),
		signal: plan.signal?.table === undefined ? plan.signal : { ...plan.signal, table: first(replaced, plan.signal.table) }
	};
	return JSON.stringify(Object.entries(named).sort(([a], [b]) => (a < b ? -1 : 1)));
}

function first(replaced: ReadonlyMap<string, string>, id: string): string {
	let oldest = id;
	for (let next = replaced.get(id); next !== undefined; next = replaced.get(next)) oldest = next;
	return oldest;
}
