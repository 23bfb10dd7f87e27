import { contextSentences } from '#lib/analysis/words/contextSentences.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Access } from '#lib/server/access.ts';
import { deletionOf } from '#lib/server/deletion.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { Report } from '#lib/server/repositories/reports.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { version } from '#lib/server/version.ts';
import { fourFigures } from '../../analyses/[analysis]/fourFigures.ts';
import { comparedFacts, planFacts } from '../../analyses/[analysis]/planFacts.ts';
import { testFacts } from '../../analyses/[analysis]/testFacts.ts';

/** A report as it will print: its words, and everything of the analysis that it rests on. */
export async function reportPage(access: Access, report: Report) {
	const { id, title, caption, notes, figure, author, createdAt, changedAt, captionEdited } = report;
	const analysis = await analyses.find(access, report.analysisId);
	const words = { id, title, caption, notes, figure, author, createdAt, changedAt, captionEdited, analysisId: report.analysisId };
	const deletion = deletionOf(access, { createdBy: report.createdBy, isUsed: false });
	// The analysis of a report may be deleted for a while; its words stay readable.
	if (analysis?.result == null) return { report: words, deletion, found: null };
	const { plan, hash, decisions, declaredAt, finishedAt, context } = analysis;
	const tree = await treeSets.findKept(access, analysis.treeSetId);
	const run = await overlapRuns.findListed(access, analysis.overlapRunId);
	if (tree === null || run === null) throw new Error(`Expected the materials of analysis ${analysis.id}; one is not there.`);
	return {
		report: words,
		deletion,
		found: {
			...resultWords(analysis.result),
			...{ decisions, hash, declaredAt, finishedAt },
			seenBefore: context === null ? [] : contextSentences(context, 'reader'),
			facts: [...comparedFacts({ tree, run }, plan), ...planFacts(plan, analysis.result.permutation)],
			materials: [
				{ what: 'Tree', label: tree.label, textHash: tree.textHash },
				{ what: 'Overlaps', label: run.label, textHash: run.textHash }
			],
			version: version()
		}
	};
}

function resultWords(result: AnalysisResult) {
	const { finding, dropped, engine, permutation } = result;
	return { finding, dropped, engine, isExact: permutation.exact, figures: fourFigures(result), groups: testFacts(result) };
}
