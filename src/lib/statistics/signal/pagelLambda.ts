import type { AgedTree } from '../agedTree.ts';
import { chiSquareUpper } from './chiSquareUpper.ts';
import { gridOf, maximiseOn } from './maximiseOn.ts';
import { fitTrait, type MeasuredTrait, type TraitFit } from './traitLikelihood.ts';
import { lambdaTree } from './traitTree.ts';

export type LambdaFit = TraitFit & {
	/** in [0, 1]: 0 no signal, 1 a random walk on the tree as it is */
	readonly lambda: number;
	/** where the likelihood is within 1.92 of its maximum: 95 %, cut at 0 and 1 */
	readonly interval: readonly [number, number];
	/** likelihood ratio against λ = 0; halved, because 0 is the end of the range */
	readonly pAgainst0: number;
	/** likelihood ratio against λ = 1; not halved, so on the careful side */
	readonly pAgainst1: number;
	readonly logLikelihoodAt0: number;
	readonly logLikelihoodAt1: number;
};

const GRID = gridOf({ from: 0, to: 1, count: 41 });
/** Half the upper 5 % point of χ² with one degree of freedom. */
const WITHIN = 1.920_729_410_347_062;
/** A likelihood ratio below this is rounding. */
const NOTHING = 1e-9;
const BISECTIONS = 50;

/**
 * Pagel's λ by maximum likelihood on [0, 1], the only range in which every tree gives a covariance.
 *
 * @see Pagel (1999), doi:10.1038/44766
 */
export function pagelLambda(tree: AgedTree, trait: MeasuredTrait): LambdaFit {
	const score = (lambda: number) => fitTrait(lambdaTree(tree, lambda), trait).logLikelihood;
	const { at: lambda } = maximiseOn(score, GRID);
	const fit = fitTrait(lambdaTree(tree, lambda), trait);
	const [logLikelihoodAt0, logLikelihoodAt1] = [score(0), score(1)];
	const ratio0 = 2 * (fit.logLikelihood - logLikelihoodAt0);
	return {
		...fit,
		lambda,
		interval: [
			edgeOf(score, fit.logLikelihood, { inside: lambda, end: 0 }),
			edgeOf(score, fit.logLikelihood, { inside: lambda, end: 1 })
		],
		pAgainst0: ratio0 > NOTHING ? chiSquareUpper(ratio0, 1) / 2 : 1,
		pAgainst1: chiSquareUpper(Math.max(0, 2 * (fit.logLikelihood - logLikelihoodAt1)), 1),
		logLikelihoodAt0,
		logLikelihoodAt1
	};
}

/** Where the profile falls by 1.92 between the maximum and an end; the end itself when it does not. */
function edgeOf(score: (at: number) => number, top: number, { inside, end }: { inside: number; end: number }): number {
	if (score(end) >= top - WITHIN) return end;
	let [kept, lost] = [inside, end];
	for (let step = 0; step < BISECTIONS; step++) {
		const middle = (kept + lost) / 2;
		if (score(middle) >= top - WITHIN) kept = middle;
		else lost = middle;
	}
	return kept;
}
