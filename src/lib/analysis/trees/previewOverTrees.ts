import type { AnalysisPreview } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { plannedArrangements } from '#lib/statistics/shuffleBatches.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';
import { areOneTree, attainableOverTrees, gatherUsedTrees } from './testOverTrees.ts';

type Differs = Pick<AnalysisPreview, 'sides' | 'rootPairShare' | 'smallestP' | 'trees'>;

/**
 * What a plan on all trees of a set would use that differs from a plan on the drawn one; nothing for a plan on one tree.
 * @throws {InputError} as `gatherUsedTrees`: what would stop the analysis itself
 */
export function previewOverTrees(prepared: PreparedAnalysis, plan: Plan): Partial<Differs> {
	const { used } = prepared.chosen;
	if (used === null) return {};
	const gathered = gatherUsedTrees({ ...prepared, plan, used });
	const { sideOf, share } = gathered.deepestSplit;
	const n = sideOf.length;
	const sides: number[] = [];
	for (const side of sideOf) sides[side] = (sides[side] ?? 0) + 1;
	const alone = sides.reduce((pairs, size) => pairs + size * (size - 1), 0);
	const free = plannedArrangements({ groups: [{ from: 0, to: n }], permutations: plan.permutations }).exact;
	return {
		sides,
		rootPairShare: 1 - alone / (n * (n - 1)),
		trees: { count: gathered.count, splitShare: share },
		...(areOneTree(gathered, prepared, plan)
			? {}
			: { smallestP: attainableOverTrees(gathered, plan, { free, within: free }).free })
	};
}
