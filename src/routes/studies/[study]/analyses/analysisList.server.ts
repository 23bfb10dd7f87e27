import { headlineWords } from '#lib/analysis/words/headlineWords.ts';
import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { comparison } from './comparison.ts';

type Asked = {
	readonly withDeleted: boolean;
	/** ids of two analyses to set side by side */ readonly compare: readonly string[];
};

/** The analyses of a study, newest first, each with its finding and what it was asked; two of them side by side when asked. */
export async function analysisList(access: Access, { withDeleted, compare }: Asked) {
	const lines = await Promise.all((await analyses.list(access)).map((listed) => analysisLine(access, listed)));
	const deleted = withDeleted ? await analyses.listDeleted(access) : [];
	const [first, second] = compare.map((id) => lines.find((line) => line.id === id)).filter((line) => line !== undefined);
	return {
		analyses: lines,
		comparison: first === undefined || second === undefined ? null : comparison(first, second),
		deleted: deleted.map(({ id, headline, deletedAt, createdAt }) => ({
			...{ id, title: headline?.title ?? 'Analysis without a result', at: deletedAt ?? createdAt }
		}))
	};
}

export type AnalysisLine = Awaited<ReturnType<typeof analysisLine>>;

async function analysisLine(access: Access, listed: analyses.ListedAnalysis) {
	const { id, status, headline, failure, plan, createdAt, finishedAt, startedAt, declaredAt, hash } = listed;
	const tree = await treeSets.findKept(access, listed.treeSetId);
	const run = await overlapRuns.findListed(access, listed.overlapRunId);
	return {
		...{ id, status, headline, plan, declaredAt, hash, failure: failure?.message ?? null },
		figures:
			headline === null ? null : headlineWords(headline, { alternative: plan.alternative, ageUnit: tree?.ageUnit ?? 'Ma' }),
		isDeclaredOnly: status === 'stopped' && startedAt === null && declaredAt !== null,
		at: finishedAt ?? createdAt,
		tree: { label: tree?.label ?? 'a tree', treeCount: tree?.treeCount ?? 1, ageUnit: tree?.ageUnit ?? ('Ma' as const) },
		run: { label: run?.label ?? 'a matrix', measure: run?.measure ?? ('other' as const) },
		isOutOfDate: status === 'finished' && (await analyses.outOfDate(access, listed)).length > 0
	};
}
