import type { PowerBlock } from '#lib/contracts/resultBlocks.ts';
import type { Plan, Statistic } from '#lib/contracts/plan.ts';
import { POWER_TRUTHS, statisticPower } from '#lib/statistics/curves/power.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';

const SHUFFLES = 199;
/** A stricter level needs more shuffles to be reached at all; below 1/2000 none is simulated. */
const MOST_SHUFFLES = 1999;
const SIMULATIONS = 200;
const FEWEST_SIMULATIONS = 50;
/** Visits of a pair, about a second's: larger trees get fewer simulations, and say so. */
const VISITS = 3e8;

/** Where powers tie the statistic that is easier to tell comes first. */
const PREFERENCE: readonly Statistic[] = ['slope', 'slope-log-age', 'nodes-plain', 'nodes-nested', 'spearman'];

type Asked = Pick<Plan, 'alpha' | 'alternative' | 'seed'>;

/**
 * How often each statistic would find a random walk of niche centres along a tree, over a grid of truths fixed
 * beforehand, and which of them does best over the whole grid. A two-sided plan spends half of alpha on the fall.
 */
export function powerOf(
	{ tree, ages, species }: Pick<PreparedAnalysis, 'tree' | 'ages' | 'species'>,
	plan: Asked,
	{ simulations: most = SIMULATIONS } = {}
): PowerBlock | null {
	const alpha = plan.alternative === 'two-sided' ? plan.alpha / 2 : plan.alpha;
	const shuffles = Math.max(SHUFFLES, Math.ceil(1 / alpha) - 1);
	if (shuffles > MOST_SHUFFLES) return null;
	const pairs = (species.length * (species.length - 1)) / 2;
	const affordable = Math.floor(VISITS / (pairs * shuffles * POWER_TRUTHS.length));
	const simulations = Math.max(FEWEST_SIMULATIONS, Math.min(most, affordable));
	const options = { truths: POWER_TRUTHS, alpha, simulations, shuffles, seed: plan.seed };
	const { rows, standardError } = statisticPower({ parent: tree.parent, ages }, options);
	return {
		simulations,
		shuffles,
		speciesSimulated: species.length,
		alpha,
		truths: POWER_TRUTHS.map((truth) => ({ ...truth })),
		rows: rows.map(({ statistic, power }) => ({ statistic, power: [...power] })),
		standardError,
		recommended: recommended(rows)
	};
}

function recommended(rows: readonly { readonly statistic: Statistic; readonly power: readonly number[] }[]): Statistic {
	const total = (statistic: Statistic): number =>
		rows.find((row) => row.statistic === statistic)?.power.reduce((sum, share) => sum + share, 0) ?? 0;
	return PREFERENCE.reduce((held, next) => (total(next) > total(held) + 1e-9 ? next : held));
}
