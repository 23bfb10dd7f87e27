import type { Plan } from '#lib/contracts/plan.ts';
import type { PermutationOptions } from '#lib/statistics/permutationTest.ts';
import { declaredStatistics } from './alsoTested.ts';

/** What a plan asks of the permutation test: the same for the whole and for each share of it. */
export function testOptions(
	plan: Plan
): Required<Pick<PermutationOptions, 'permutations' | 'seed' | 'keep' | 'withinStatistics'>> {
	const statistics = declaredStatistics(plan);
	return {
		permutations: plan.permutations,
		seed: plan.seed,
		keep: [...new Set(['nodes-plain', ...statistics] as const)],
		withinStatistics: statistics
	};
}
