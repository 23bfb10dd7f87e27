import type { Access } from '#lib/server/access.ts';
import { deletionOf } from '#lib/server/deletion.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { isUsed } from '#lib/server/repositories/dependents.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { findingsView } from './findingsView.ts';
import { liveMaterials, type TreeSize } from './liveMaterials.server.ts';

/** What the page of one analysis shows, by where it stands. */
export async function analysisPage(access: Access, analysis: analyses.Analysis) {
	const { id, status, plan, hash, decisions, createdAt, declaredAt, startedAt, finishedAt } = analysis;
	const tree = await treeSets.findKept(access, analysis.treeSetId);
	const run = await overlapRuns.findListed(access, analysis.overlapRunId);
	if (tree === null || run === null) throw new Error(`Expected the materials of analysis ${id}; one is not there.`);
	return {
		...{ id, status, plan, hash, decisions, createdAt, declaredAt, startedAt, finishedAt },
		materials: {
			tree: { label: tree.label, treeCount: tree.treeCount, ageUnit: tree.ageUnit, textHash: tree.textHash },
			run: { label: run.label, measure: run.measure, textHash: run.textHash }
		},
		deletion: deletionOf(access, { createdBy: analysis.createdBy, isUsed: await isUsed({ analysis: id }) }),
		failure: analysis.failure,
		changes: status === 'finished' ? await analyses.outOfDate(access, analysis) : [],
		running: status === 'waiting' || status === 'working' ? await runningView(access, analysis, tree) : null,
		findings: analysis.result === null ? null : findingsView(analysis.result)
	};
}

async function runningView(access: Access, { id, progress }: analyses.Analysis, tree: TreeSize) {
	return { progress, live: await liveMaterials(access, id, tree) };
}
