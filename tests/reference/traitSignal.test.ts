import { describe, expect, it } from 'vitest';
import { exampleTree, type ExampleTree } from '#lib/statistics/exampleTrees.ts';
import { testK } from '#lib/statistics/signal/blombergK.ts';
import { pagelLambda } from '#lib/statistics/signal/pagelLambda.ts';
import { independentContrasts, pruneTraits } from '#lib/statistics/signal/pruneTraits.ts';
import { traitModels } from '#lib/statistics/signal/traitModels.ts';
import { brownianTree } from '#lib/statistics/signal/traitTree.ts';
import reference from '../../fixtures/reference/comparative.json' with { type: 'json' };

// Values of R 4.2 with ape, phytools and nlme; see fixtures/README.md. Digits are lost to the source's own optimisers in
// the models that search (λ, OU); elsewhere nine hold.
const SHUFFLES = 4999;

function read(newick: string, trait: Readonly<Record<string, number | undefined>>): { tree: ExampleTree; values: Float64Array } {
	const tree = exampleTree(newick);
	return { tree, values: Float64Array.from(tree.labels, (label) => trait[label] ?? Number.NaN) };
}

/** Relative to the size of the expected value, so that digits are what is compared. */
function expectDigits(value: number, expected: number, digits: number): void {
	expect(Math.abs(value - expected)).toBeLessThanOrEqual(Math.max(Math.abs(expected), 1e-3) * 10 ** -digits);
}

describe.each(reference.traits)('$name', ({ newick, trait, blomberg_K: k, pagel_lambda: pagel, model_fits: fits, contrasts }) => {
	const { tree, values } = read(newick, trait);
	const measured = { values, standardErrors: null };

	it('has the K and the permutation p of R', () => {
		const ours = testK(tree, values, { permutations: SHUFFLES, seed: 11, walks: 1 });
		expectDigits(ours.k, k.K, 10);
		if (ours.exact)
			expect({ count: ours.count, asExtreme: ours.asExtreme }).toEqual({ count: k.permutations, asExtreme: k.count_ge });
		// 4 standard errors of the difference of two Monte Carlo values, and the one count that both add.
		else expect(Math.abs(ours.p - k.p_upper)).toBeLessThan(4 * Math.hypot(ours.monteCarloStandardError, k.mc_se) + 2 / SHUFFLES);
	});

	it('has the root mean, the rate and the contrasts of R', () => {
		const { rootMean, quadratic } = pruneTraits(brownianTree(tree), values);
		expectDigits(rootMean, fits.BM.root, 9);
		expectDigits(quadratic / values.length, fits.BM.sigma2_ml, 9);
		const ours = independentContrasts(brownianTree(tree), values).map(Math.abs);
		const theirs = contrasts.contrasts.map(({ abs_contrast: size }) => size);
		const sorted = (list: readonly number[]) => [...list].sort((a, b) => a - b);
		for (const [i, size] of sorted(theirs).entries()) expectDigits(sorted(ours)[i] ?? Number.NaN, size, 8);
		// Identity: contrasts gather the whole mean square.
		expectDigits(ours.reduce((sum, c) => sum + c * c, 0) / (values.length - 1), fits.BM.sigma2_reml, 9);
	});

	it('has the likelihoods of R', () => {
		const lambda = pagelLambda(tree, measured);
		expectDigits(lambda.logLikelihood, pagel.bounded_0_1.lnL, 9);
		expectDigits(lambda.logLikelihoodAt0, pagel.lnL_lambda0, 9);
		expectDigits(lambda.logLikelihoodAt1, pagel.lnL_lambda1, 9);
		expect(Math.abs(lambda.lambda - pagel.bounded_0_1.lambda)).toBeLessThan(1e-4);
		expect(Math.abs(lambda.pAgainst0 - pagel.p_LR_vs_0_half_mixture)).toBeLessThan(1e-6);
		expect(Math.abs(lambda.pAgainst1 - pagel.p_LR_vs_1_chisq1)).toBeLessThan(1e-6);

		const [brownian, noise, , pulled] = traitModels(tree, measured);
		expectDigits(brownian?.logLikelihood ?? Number.NaN, fits.BM.lnL, 9);
		expectDigits(brownian?.aicc ?? Number.NaN, fits.BM.AICc, 9);
		expectDigits(noise?.logLikelihood ?? Number.NaN, fits.white_noise.lnL, 9);
		if (isUltrametric(tree)) {
			expectDigits(pulled?.logLikelihood ?? Number.NaN, fits.OU_fixed_root.lnL, 6);
			expectDigits(pulled?.aicc ?? Number.NaN, fits.OU_fixed_root.AICc, 6);
		}
	});
});

/** The tree of branches that stands for OU needs tips that live today. */
function isUltrametric({ parent, ages }: ExampleTree): boolean {
	const inner = new Set(parent);
	return [...ages.entries()].every(([node, age]) => inner.has(node) || age < 1e-9 * (ages[0] ?? 1));
}

describe('a polytomy', () => {
	it('has the K, rate, λ and likelihoods of R', () => {
		const { newick, trait, K, root_gls, sigma2_reml, pagel, fits } = reference.polytomy;
		const { tree, values } = read(newick, trait);
		const ours = testK(tree, values, { permutations: 99, seed: 1, walks: 1 });
		expectDigits(ours.k, K.K, 12);
		expectDigits(ours.p, K.p_upper, 12);
		const { rootMean, quadratic } = pruneTraits(brownianTree(tree), values);
		expectDigits(rootMean, root_gls, 12);
		expectDigits(quadratic / 6, sigma2_reml, 12);
		const lambda = pagelLambda(tree, { values, standardErrors: null });
		expect(lambda).toMatchObject({ lambda: 0, pAgainst0: 1 });
		expectDigits(lambda.pAgainst1, pagel.p_LR_vs_1_chisq1, 8);
		expectDigits(lambda.logLikelihoodAt1, fits.BM.lnL, 12);
	});
});
