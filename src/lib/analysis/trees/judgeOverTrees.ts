import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { TreesBlock } from '#lib/contracts/resultBlocks.ts';
import type { AveragedOutcome, AveragedProgress } from '#lib/statistics/posterior/averagedTest.ts';
import type { GatheredTrees } from '#lib/statistics/posterior/gatherTrees.ts';
import type { PermutationDesign } from '#lib/statistics/permutationDesign.ts';
import type { PermutationProgress } from '#lib/statistics/permutationTest.ts';
import { plannedArrangements } from '#lib/statistics/shuffleBatches.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';
import { areOneTree, attainableOverTrees, testOverTrees, treesBlock } from './testOverTrees.ts';

type Permutation = AnalysisResult['permutation'];

/** The verdict of all trees, in the places where a test on one tree puts its own. */
export type OverTrees = {
	readonly outcome: AveragedOutcome;
	/** the block of the drawn tree, with what only all trees can say */
	readonly permutationOf: (permutation: Permutation) => Permutation;
	readonly blockOf: (permutation: Permutation) => TreesBlock;
	/** told of the shuffles of the drawn tree, which follow: p stays that of all trees */
	readonly onProgress: Listener | undefined;
};

type Listener = (progress: PermutationProgress) => void;
type Judged = {
	readonly prepared: PreparedAnalysis;
	readonly plan: Plan;
	readonly design: PermutationDesign;
	readonly onProgress: Listener | undefined;
};

/**
 * The test over all trees of a plan that asks for them; null for a plan on one tree.
 * @throws {InputError} as `testOverTrees`
 */
export function judgeOverTrees({ prepared, plan, design, onProgress }: Judged): OverTrees | null {
	const { used } = prepared.chosen;
	if (used === null) return null;
	const { tell, afterwards } = onProgress ? inTwoParts(onProgress, design, plan) : { tell: undefined, afterwards: undefined };
	const tested = testOverTrees({ ...prepared, plan, used, ...(tell ? { onProgress: tell } : {}) });
	const { outcome, gathered } = tested;
	return {
		outcome,
		onProgress: afterwards,
		permutationOf: (permutation) => withAttainable(permutation, { gathered, prepared, plan }),
		blockOf: ({ p }) => treesBlock(tested, used, p)
	};
}

/** The test over all trees first, the shuffles of the drawn tree after it, as one count. */
function inTwoParts(onProgress: Listener, { free, within }: PermutationDesign, { permutations }: Plan) {
	const planned = (groups: typeof free) => (groups.length === 0 ? 0 : plannedArrangements({ groups, permutations }).count);
	const ofDrawn = planned(free) + planned(within);
	let before = 0;
	return {
		tell: ({ question, done, total, before: earlier, counts }: AveragedProgress) => {
			before = total;
			const newSlopes = new Float64Array(0);
			onProgress({ question, done: earlier + done, total: total + ofDrawn, asked: { done, counts }, newSlopes });
		},
		// Called “within”, whose counts nobody shows, so that the p of all trees stays.
		afterwards: (progress: PermutationProgress) =>
			onProgress({ ...progress, question: 'within', done: before + progress.done, total: before + progress.total })
	};
}

type Attainable = { readonly gathered: GatheredTrees; readonly prepared: PreparedAnalysis; readonly plan: Plan };

function withAttainable(permutation: Permutation, { gathered, prepared, plan }: Attainable): Permutation {
	if (areOneTree(gathered, prepared, plan)) return permutation;
	const within = permutation.withinDeepestSplit;
	const smallest = attainableOverTrees(gathered, plan, { free: permutation.exact, within: within?.exact ?? false });
	return {
		...permutation,
		smallestP: smallest.free,
		withinDeepestSplit: within && { ...within, smallestP: smallest.within }
	};
}
