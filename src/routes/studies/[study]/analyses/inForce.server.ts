import type { Plan } from '#lib/contracts/plan.ts';
import type { Access } from '#lib/server/access.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';

type Used = { readonly treeSetId: string; readonly overlapRunId: string; readonly plan: Pick<Plan, 'covariates'> };
type Standing = Pick<Plan, 'treeSet' | 'overlapRun' | 'covariates'>;
type Kept = { readonly id: string; readonly replaces: string | null };

/** The materials that stand in the place of those an analysis ran on: themselves, or what replaced them since. */
export async function inForce(access: Access, used: Used): Promise<Standing> {
	const standing = used.plan.covariates.length === 0 ? [] : await covariates.list(access);
	return {
		treeSet: heir(await treeSets.list(access), used.treeSetId),
		overlapRun: heir(await overlapRuns.list(access), used.overlapRunId),
		covariates: used.plan.covariates.map((id) => heir(standing, id))
	};
}

/** Only what stands is listed, so an older replacement that was replaced again is found through the one after it. */
function heir(standing: readonly Kept[], id: string): string {
	if (standing.some((kept) => kept.id === id)) return id;
	return standing.find((kept) => kept.replaces === id)?.id ?? id;
}
