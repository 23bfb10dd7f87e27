import { getTableColumns, sql } from 'drizzle-orm';
import type { HeadlineFigures } from '#lib/analysis/words/headlineWords.ts';
import type { AnalysisProgress, AnalysisResult, FindingKind } from '#lib/contracts/analysisResult.ts';
import type { AnalysisStatus } from '#lib/contracts/materials.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { PlanContext } from '#lib/contracts/planContext.ts';
import { analyses } from '#lib/server/db/schema.ts';

export type AnalysisFailure = { readonly code: string; readonly message: string; readonly reference?: string };
export type UsedDecision = { readonly from: string; readonly to: string | null; readonly why?: string };

/** An analysis without what is long: what lists show. */
export type ListedAnalysis = {
	readonly id: string;
	readonly studyId: string;
	readonly treeSetId: string;
	readonly overlapRunId: string;
	readonly plan: Plan;
	readonly hash: string;
	readonly decisions: readonly UsedDecision[];
	readonly status: AnalysisStatus;
	readonly failure: AnalysisFailure | null;
	/** the few numbers of a finished analysis that a line of a list holds */
	readonly headline: Headline | null;
	/** what had been seen of the matrix when the plan was written down; null where that was not kept yet */
	readonly context: PlanContext | null;
	/** the plan was written down before anything ran */
	readonly declaredAt: string | null;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly startedAt: string | null;
	readonly finishedAt: string | null;
	readonly deletedAt: string | null;
};

export type Headline = HeadlineFigures & {
	readonly species: number;
	readonly kind: FindingKind;
	readonly title: string;
};

export type Analysis = Omit<ListedAnalysis, 'headline'> & {
	readonly progress: AnalysisProgress | null;
	/** there when, and only when, it has finished */
	readonly result: AnalysisResult | null;
};

type Row = typeof analyses.$inferSelect;
type ListedRow = Omit<Row, 'result' | 'progress'> & { headline: Headline | null };

const { result: _result, progress: _progress, ...short } = getTableColumns(analyses);
export const listedColumns = {
	...short,
	headline: sql<Headline | null>`case when ${analyses.result} is null then null else jsonb_build_object(
		'species', ${analyses.result}->'species',
		'slope', ${analyses.result}->'regression'->'slope',
		'p', ${analyses.result}->'permutation'->'p',
		'exact', ${analyses.result}->'permutation'->'exact',
		'count', ${analyses.result}->'permutation'->'count',
		'within', ${analyses.result}->'permutation'->'withinDeepestSplit',
		'kind', ${analyses.result}->'finding'->'kind',
		'title', ${analyses.result}->'finding'->'title'
	) end`
};

export function listedAnalysis(row: ListedRow): ListedAnalysis {
	const { heartbeatAt: _heartbeat, ...rest } = row;
	return { ...rest, ...timesOf(row) };
}

export function analysisFromRow(row: Row): Analysis {
	const { heartbeatAt: _heartbeat, ...rest } = row;
	return { ...rest, ...timesOf(row) };
}

type Times = Pick<Row, 'createdAt' | 'declaredAt' | 'startedAt' | 'finishedAt' | 'deletedAt'>;

function timesOf({ createdAt, declaredAt, startedAt, finishedAt, deletedAt }: Times) {
	return {
		createdAt: createdAt.toISOString(),
		declaredAt: declaredAt?.toISOString() ?? null,
		startedAt: startedAt?.toISOString() ?? null,
		finishedAt: finishedAt?.toISOString() ?? null,
		deletedAt: deletedAt?.toISOString() ?? null
	};
}
