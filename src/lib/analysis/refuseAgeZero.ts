import type { Plan } from '#lib/contracts/plan.ts';
import type { PermutationDesign } from '#lib/statistics/permutationDesign.ts';
import { declaredStatistics } from './alsoTested.ts';
import { AnalysisRefusal } from './refusal.ts';

/** @throws {AnalysisRefusal} `age-zero` when a declared statistic takes the logarithm of an age that is 0 */
export function refuseAgeZero({ functionals }: PermutationDesign, plan: Plan): void {
	const isOffered = functionals.some(({ statistic }) => statistic === 'slope-log-age');
	if (isOffered || !declaredStatistics(plan).includes('slope-log-age')) return;
	throw new AnalysisRefusal(
		'age-zero',
		'The slope on the logarithm of age needs every common ancestor older than 0; at least one has age 0. Choose the slope on age.'
	);
}
