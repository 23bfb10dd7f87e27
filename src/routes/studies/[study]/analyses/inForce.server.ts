import type { Plan } from '#lib/contracts/plan.ts';
import type { Access } from '#lib/server/access.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';

type Used = { readonly treeSetId: string; readonly overlapRunId: string; readonly plan: Pick<Plan, 'covariates' | 'signal'> };
type Kept = { readonly id: string; readonly replaces: string | null };
type Materials = Pick<Plan, 'treeSet' | 'overlapRun' | 'covariates' | 'signal'>;

/** The materials that stand in the place of those an analysis ran on: themselves, or what replaced them since. */
export async function inForce(access: Access, { treeSetId, overlapRunId, plan }: Used): Promise<Materials> {
	const allowed = plan.covariates.length === 0 ? [] : await covariates.list(access);
	return {
		treeSet: heir(await treeSets.list(access), treeSetId),
		overlapRun: heir(await overlapRuns.list(access), overlapRunId),
		covariates: plan.covariates.map((id) => heir(allowed, id)),
		signal: await signalInForce(access, plan.signal)
	};
}

async function signalInForce(access: Access, signal: Plan['signal']): Promise<Plan['signal']> {
	if (signal?.table === undefined) return signal;
	return { ...signal, table: heir(await nicheTables.list(access), signal.table) };
}

/** Only what stands is listed, so an older replacement that was replaced again is found through the one after it. */
function heir(standing: readonly Kept[], id: string): string {
	if (standing.some((kept) => kept.id === id)) return id;
	return standing.find((kept) => kept.replaces === id)?.id ?? id;
}
