import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';

/** Whether something a report's analysis used has changed since; a deleted analysis is told on the report itself. */
export async function restsOnOld(
	access: Access,
	{ analysisId }: { readonly analysisId: string },
	asked: readonly analyses.ListedAnalysis[]
): Promise<boolean> {
	const analysis = asked.find(({ id }) => id === analysisId);
	return analysis !== undefined && (await analyses.outOfDate(access, analysis)).length > 0;
}
