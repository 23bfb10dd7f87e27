import { headlineWords } from '#lib/analysis/words/headlineWords.ts';
import type { Access } from '#lib/server/access.ts';
import { restorable } from '#lib/server/deletion.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { comparison } from './comparison.ts';
import { findRenewals } from './renewals.server.ts';

/**
 * The analyses of a study, newest first, each with its finding and what it was asked; two of them side by side when asked.
 * @param compare - ids of two analyses
 */
export async function analysisList(access: Access, compare: readonly string[]) {
	const asked = await analyses.list(access);
	const lines = await Promise.all(asked.map((listed) => analysisLine(access, listed)));
	const renewedBy = new Map((await findRenewals(access, asked)).map(({ before, after }) => [before, after]));
	const deleted = restorable(access, await analyses.listDeleted(access));
	const [first, second] = compare.map((id) => lines.find((line) => line.id === id)).filter((line) => line !== undefined);
	return {
		analyses: lines.map((line) => ({ ...line, renewedBy: renewedBy.get(line.id) ?? null })),
		staleCount: lines.filter(({ id, isOutOfDate }) => isOutOfDate && !renewedBy.has(id)).length,
		renewedCount: renewedBy.size,
		comparison: first === undefined || second === undefined ? null : comparison(first, second),
		deleted: deleted.map(({ id, headline, deletedAt, createdAt }) => ({
			...{ id, title: headline?.title ?? 'Analysis without a result', at: deletedAt ?? createdAt }
		}))
	};
}

export type AnalysisLine = Awaited<ReturnType<typeof analysisLine>>;

export async function analysisLine(access: Access, listed: analyses.ListedAnalysis) {
	const { id, status, headline, failure, plan, createdAt, finishedAt, startedAt, declaredAt, hash, decisions } = listed;
	const { treeSetId, overlapRunId } = listed;
	const tree = await treeSets.findKept(access, treeSetId);
	const run = await overlapRuns.findListed(access, overlapRunId);
	return {
		...{ id, status, headline, plan, declaredAt, hash, decisions, treeSetId, overlapRunId },
		failure: failure?.message ?? null,
		figures:
			headline === null ? null : headlineWords(headline, { alternative: plan.alternative, ageUnit: tree?.ageUnit ?? 'Ma' }),
		isDeclaredOnly: status === 'stopped' && startedAt === null && declaredAt !== null,
		at: finishedAt ?? createdAt,
		tree: { label: tree?.label ?? 'a tree', treeCount: tree?.treeCount ?? 1, ageUnit: tree?.ageUnit ?? ('Ma' as const) },
		run: { label: run?.label ?? 'a matrix', measure: run?.measure ?? ('other' as const) },
		isOutOfDate: status === 'finished' && (await analyses.outOfDate(access, listed)).length > 0
	};
}
