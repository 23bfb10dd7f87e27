import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { sisterPairs } from '#lib/statistics/clades/sisterPairs.ts';
import type { BlockContext } from './blockContext.ts';

/** Sister species beside all other pairs, in overlap as it was brought; absent where no two species are sisters. */
export function sistersBlock({ prepared }: BlockContext): Pick<AnalysisResult, 'sisters'> {
	const { tree, ages, overlap } = prepared;
	const { cherries, meanCherries, others, meanOthers } = sisterPairs(treeShape({ parent: tree.parent, ages }), overlap);
	return meanCherries === null || meanOthers === null ? {} : { sisters: { cherries, meanCherries, others, meanOthers } };
}
