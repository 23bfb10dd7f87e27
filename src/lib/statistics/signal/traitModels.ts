import type { AgedTree } from '../agedTree.ts';
import { gridOf, maximiseOn } from './maximiseOn.ts';
import { pagelLambda } from './pagelLambda.ts';
import { fitTrait, type MeasuredTrait, type TraitFit } from './traitLikelihood.ts';
import { brownianTree, burstTree, noiseTree, pulledTree } from './traitTree.ts';

export type TraitModelName = 'brownian' | 'white-noise' | 'lambda' | 'ornstein-uhlenbeck' | 'early-burst';

export type TraitModel = {
	readonly model: TraitModelName;
	readonly logLikelihood: number;
	/** number of parameters, k */
	readonly parameters: number;
	/** null where n <= k + 1 leaves it undefined */
	readonly aicc: number | null;
	/** share of the models with an AICc; null below 10 species */
	readonly weight: number | null;
	/** λ; the half-life ln 2 / α; the change of rate r; null for the others */
	readonly estimate: number | null;
	/** the search ran into its end, so the model is no different from a simpler one here */
	readonly atBound: boolean;
};

/** Below this many species no weights are given. @see Burnham & Anderson (2002): from memory; common practice */
export const FEWEST_FOR_WEIGHTS = 10;
/** An early burst cannot be told from less below this. Common practice. */
export const FEWEST_FOR_BURST = 50;
/** α is looked for where α × root age lies in this range: beyond it a model is Brownian motion, or white noise. */
const PULL_RANGE = { from: 1e-4, to: 200, count: 73, byRatio: true } as const;
/** r × root age: at −0.0001 the rate is constant, at −10 all change happened at the root. */
const BURST_RANGE = { from: 1e-4, to: 10, count: 51, byRatio: true } as const;
const AT_END = 1 + 1e-6;

/** Fits the models that so many species can tell apart, best described by their AICc. */
export function traitModels(tree: AgedTree, trait: MeasuredTrait): TraitModel[] {
	const n = trait.values.length;
	const fitted = [brownian(tree, trait), noise(tree, trait), lambda(tree, trait), pulled(tree, trait)];
	if (n >= FEWEST_FOR_BURST) fitted.push(burst(tree, trait));
	const withCriterion = fitted.map((model) => ({ ...model, aicc: aicc(model, n) }));
	return weighted(withCriterion, n);
}

type Fitted = Pick<TraitModel, 'model' | 'logLikelihood' | 'parameters' | 'estimate' | 'atBound'>;

function brownian(tree: AgedTree, trait: MeasuredTrait): Fitted {
	return { model: 'brownian', ...scoreOf(fitTrait(brownianTree(tree), trait)), parameters: 2, estimate: null, atBound: false };
}

function noise(tree: AgedTree, trait: MeasuredTrait): Fitted {
	return { model: 'white-noise', ...scoreOf(fitTrait(noiseTree(tree), trait)), parameters: 2, estimate: null, atBound: false };
}

function lambda(tree: AgedTree, trait: MeasuredTrait): Fitted {
	const fit = pagelLambda(tree, trait);
	const atBound = fit.lambda === 0 || fit.lambda === 1;
	return { model: 'lambda', ...scoreOf(fit), parameters: 3, estimate: fit.lambda, atBound };
}

function pulled(tree: AgedTree, trait: MeasuredTrait): Fitted {
	const height = tree.ages[0] ?? 1;
	const best = maximiseOn((pull) => fitTrait(pulledTree(tree, pull / height), trait).logLikelihood, gridOf(PULL_RANGE));
	return {
		model: 'ornstein-uhlenbeck',
		logLikelihood: best.value,
		parameters: 3,
		estimate: (Math.LN2 * height) / best.at,
		atBound: isAtEnd(best.at, PULL_RANGE)
	};
}

function burst(tree: AgedTree, trait: MeasuredTrait): Fitted {
	const height = tree.ages[0] ?? 1;
	const best = maximiseOn((change) => fitTrait(burstTree(tree, -change / height), trait).logLikelihood, gridOf(BURST_RANGE));
	return {
		model: 'early-burst',
		logLikelihood: best.value,
		parameters: 3,
		estimate: -best.at / height,
		atBound: isAtEnd(best.at, BURST_RANGE)
	};
}

function scoreOf({ logLikelihood }: TraitFit): { logLikelihood: number } {
	return { logLikelihood };
}

function isAtEnd(at: number, { from, to }: { from: number; to: number }): boolean {
	return at <= from * AT_END || at >= to / AT_END;
}

/** AIC with the correction for small samples, −2 ln L + 2k + 2k(k + 1) / (n − k − 1). */
function aicc({ logLikelihood, parameters: k }: Fitted, n: number): number | null {
	return n <= k + 1 ? null : -2 * logLikelihood + 2 * k + (2 * k * (k + 1)) / (n - k - 1);
}

function weighted(models: readonly (Fitted & { aicc: number | null })[], n: number): TraitModel[] {
	const known = models.flatMap((model) => (model.aicc === null ? [] : [model.aicc]));
	if (n < FEWEST_FOR_WEIGHTS || known.length < models.length) return models.map((model) => ({ ...model, weight: null }));
	const best = Math.min(...known);
	const total = known.reduce((sum, value) => sum + Math.exp((best - value) / 2), 0);
	return models.map((model) => ({ ...model, weight: Math.exp((best - (model.aicc ?? best)) / 2) / total }));
}
