import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { found } from './found.ts';
import { Refusal } from './refusal.ts';

export type FinishedAnalysis = analyses.Analysis & { readonly result: AnalysisResult };

/** @throws {Refusal} 404 when it is not there; 422 `not-finished` while it has no result */
export async function finished(access: Access, id: string): Promise<FinishedAnalysis> {
	const analysis = found(await analyses.find(access, id));
	const { result, status } = analysis;
	if (result !== null) return { ...analysis, result };
	throw new Refusal(
		422,
		'not-finished',
		`Expected a finished analysis; this one is ${status} and has no result to draw or to list.`
	);
}
