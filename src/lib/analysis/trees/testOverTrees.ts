import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { TreesBlock } from '#lib/contracts/resultBlocks.ts';
import { identityArrangement } from '#lib/statistics/arrangements.ts';
import { averagedTest, type AveragedOutcome, type AveragedProgress } from '#lib/statistics/posterior/averagedTest.ts';
import { distribution } from '#lib/statistics/posterior/distribution.ts';
import { gatherTrees, type GatheredTrees } from '#lib/statistics/posterior/gatherTrees.ts';
import { declaredStatistics } from '../alsoTested.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';
import { smallestPOverTrees } from './attainableOverTrees.ts';
import { posteriorTrees } from './posteriorTrees.ts';
import { treeCalled, type UsedTrees } from './usedTrees.ts';

/** Lines of single trees that a figure draws. */
const MOST_LINES = 200;
/** Weights closer than this share of the largest are equal but for the rounding of a mean. */
const SAME_WEIGHT = 1e-9;

/** A test over all trees of a set, and what the set says by itself. */
export type TestOverTrees = {
	readonly outcome: AveragedOutcome;
	readonly gathered: GatheredTrees;
};

type Asked = Pick<PreparedAnalysis, 'tree' | 'ages' | 'species' | 'response'> & {
	readonly plan: Plan;
	readonly used: UsedTrees;
	readonly onProgress?: (progress: AveragedProgress) => void;
};

/**
 * Every tree read into one weight per pair.
 * @throws {InputError} as `posteriorTrees` and `gatherTrees`
 */
export function gatherUsedTrees({ tree, ages, species, response, plan, used }: Omit<Asked, 'onProgress'>): GatheredTrees {
	return gatherTrees({
		trees: posteriorTrees(used.trees, species),
		displayed: { parent: tree.parent, ages },
		overlap: response,
		tipCount: species.length,
		statistics: declaredStatistics(plan),
		nameOf: (index) => treeCalled(used.trees[index] ?? { index, name: '' })
	});
}

/** @throws {InputError} as `gatherUsedTrees` */
export function testOverTrees(asked: Asked): TestOverTrees {
	const { species, response, plan, onProgress } = asked;
	const gathered = gatherUsedTrees(asked);
	const outcome = averagedTest({
		overlap: response,
		tipCount: species.length,
		gathered,
		permutations: plan.permutations,
		seed: plan.seed,
		...(onProgress ? { onProgress } : {})
	});
	return { outcome, gathered };
}

/** What the weights of all trees allow at best, in the tail of the plan; on one tree `attainable` finds more symmetries. */
export function attainableOverTrees(
	gathered: GatheredTrees,
	plan: Plan,
	exact: { readonly free: boolean; readonly within: boolean }
) {
	const weights = gathered.averaged.find(({ statistic }) => statistic === plan.statistic)?.weights ?? new Float64Array(0);
	const sides = plan.alternative === 'two-sided' ? 2 : 1;
	const { sideOf } = gathered.deepestSplit;
	const smallest = (question: { sideOf: Int32Array; exact: boolean }) =>
		Math.min(1, sides * smallestPOverTrees({ weights, shuffles: plan.permutations, ...question }));
	return {
		free: smallest({ sideOf: sideOf.map(() => 0), exact: exact.free }),
		within: smallest({ sideOf, exact: exact.within })
	};
}

/** Whether all trees weigh the pairs as the drawn one does: then its mirrored clades tie as well. */
export function areOneTree(
	{ averaged }: GatheredTrees,
	{ tree, ages, species, response }: PreparedAnalysis,
	plan: Plan
): boolean {
	const rows = identityArrangement(species.length);
	const drawn = { parent: tree.parent, ages, rows };
	const alone = gatherTrees({
		trees: [drawn],
		displayed: drawn,
		overlap: response,
		tipCount: species.length,
		statistics: declaredStatistics(plan),
		nameOf: String
	});
	return averaged.every(({ weights }, which) => {
		const single = alone.averaged[which]?.weights ?? weights;
		const largest = single.reduce((most, weight) => Math.max(most, Math.abs(weight)), 0);
		return weights.every((weight, cell) => Math.abs(weight - (single[cell] ?? 0)) <= SAME_WEIGHT * largest);
	});
}

/** The block `trees` of a result. */
export function treesBlock(
	{ gathered, outcome }: TestOverTrees,
	used: UsedTrees,
	p: AnalysisResult['permutation']['p']
): TreesBlock {
	const { slopes, intercepts, r, rootAges, count, clades, deepestSplit } = gathered;
	const step = Math.max(1, count / MOST_LINES);
	return {
		count,
		inText: used.inText,
		burnIn: used.burnIn,
		thin: used.thin,
		slopes: distribution(slopes),
		intercepts: distribution(intercepts),
		r: distribution(r),
		rootAge: distribution(rootAges),
		p,
		shareBelow: slopes.reduce((below, slope) => (slope < 0 ? below + 1 : below), 0) / count,
		deepestSplit: { sides: [...(outcome.within?.sides ?? [])], share: deepestSplit.share },
		nodes: clades.map(({ node, share, age }) => ({ node, share, age })),
		lines: Array.from({ length: Math.min(count, MOST_LINES) }, (_, i) => {
			const at = Math.floor(i * step);
			return { slope: slopes[at] ?? 0, intercept: intercepts[at] ?? 0 };
		})
	};
}
