import { variance } from 'simple-statistics';
import { gridOf, maximiseOn } from './maximiseOn.ts';
import { pruneTraits } from './pruneTraits.ts';
import type { TraitTree } from './traitTree.ts';

export type TraitFit = {
	readonly logLikelihood: number;
	/** s², unit of the trait squared per unit of the model's variance; maximum likelihood */
	readonly rate: number;
	/** unit of the trait */
	readonly mean: number;
};

/** A trait and what is known of its error. */
export type MeasuredTrait = {
	/** shape (tips,), in tree order */
	readonly values: Float64Array;
	/** shape (tips,); standard error of each value, or null when none are known */
	readonly standardErrors: Float64Array | null;
};

/** Rates are looked for from a millionth to a thousand times the one that would spread species as they are spread. */
const RATE_GRID = { from: 1e-6, to: 1e3, count: 46, byRatio: true } as const;

/**
 * The Gaussian likelihood of a trait, with mean and rate at their maximum:
 * ln L = −½ (n ln 2πs² + ln|V| + n), s² = (x − a)'V⁻¹(x − a) / n. With standard errors the covariance is s²V + diag(se²)
 * and s² is searched for.
 */
export function fitTrait(tree: TraitTree, { values, standardErrors }: MeasuredTrait): TraitFit {
	const n = values.length;
	if (standardErrors !== null) return fitWithErrors(tree, values, standardErrors);
	const { quadratic, logDeterminant, rootMean } = pruneTraits(tree, values);
	const rate = quadratic / n;
	return { logLikelihood: -0.5 * (n * Math.log(2 * Math.PI * rate) + logDeterminant + n), rate, mean: rootMean };
}

function fitWithErrors(tree: TraitTree, values: Float64Array, standardErrors: Float64Array): TraitFit {
	const noise = standardErrors.map((error) => error * error);
	const measured = (rate: number) => fitAtRate(tree, values, { rate, noise });
	const likely = variance([...values]) / gatheredBy(tree, tree.tips[0] ?? 0);
	const grid = gridOf(RATE_GRID).map((share) => share * likely);
	return measured(maximiseOn((rate) => measured(rate).logLikelihood, grid).at);
}

/** Variance per unit of rate from the root to a node. */
function gatheredBy({ parent, edges }: TraitTree, node: number): number {
	let sum = 0;
	for (let at = node; at > 0; at = parent[at] ?? 0) sum += edges[at] ?? 0;
	return sum;
}

function fitAtRate(tree: TraitTree, values: Float64Array, { rate, noise }: { rate: number; noise: Float64Array }): TraitFit {
	const { quadratic, logDeterminant, rootMean } = pruneTraits(tree, values, { rate, noise });
	const logLikelihood = -0.5 * (values.length * Math.log(2 * Math.PI) + logDeterminant + quadratic);
	return { logLikelihood, rate, mean: rootMean };
}
