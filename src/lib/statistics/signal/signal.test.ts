import { describe, expect, it } from 'vitest';
import { drawnTree, exampleTree } from '../exampleTrees.ts';
import { nextNormal, randomStream } from '../randomStream.ts';
import { blombergK, kScale, testK } from './blombergK.ts';
import { gridOf, maximiseOn } from './maximiseOn.ts';
import { pagelLambda } from './pagelLambda.ts';
import { independentContrasts, pruneTraits } from './pruneTraits.ts';
import { fitTrait } from './traitLikelihood.ts';
import { traitModels } from './traitModels.ts';
import { brownianTree, burstTree, noiseTree, pulledTree } from './traitTree.ts';

const tree = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
// Mean cell of four species on five cells, worked out by hand.
const positions = Float64Array.of(1, 1.3, 1.7, 3);
const trait = { values: positions, standardErrors: null };
const options = { permutations: 999, seed: 5, walks: 199 };

/** The covariance of four tips by its definition, and the fit by inverting it: the long way, to check the short one. */
function dense(covariance: (age: number) => number, x: Float64Array) {
	const ages = [
		[0, 1, 2, 4],
		[1, 0, 2, 4],
		[2, 2, 0, 4],
		[4, 4, 4, 0]
	];
	const matrix = ages.map((row) => row.map(covariance));
	const inverse = inverted(matrix);
	const sum = (f: (i: number, j: number) => number) =>
		[0, 1, 2, 3].reduce((all, i) => all + [0, 1, 2, 3].reduce((row, j) => row + (inverse[i]?.[j] ?? 0) * f(i, j), 0), 0);
	const mean = sum((_, j) => x[j] ?? 0) / sum(() => 1);
	return {
		rootMean: mean,
		quadratic: sum((i, j) => ((x[i] ?? 0) - mean) * ((x[j] ?? 0) - mean)),
		rootVariance: 1 / sum(() => 1)
	};
}

function inverted(matrix: readonly (readonly number[])[]): number[][] {
	const n = matrix.length;
	const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
	for (let k = 0; k < n; k++) {
		const pivot = work[k]?.[k] ?? 1;
		work[k] = (work[k] ?? []).map((value) => value / pivot);
		for (let i = 0; i < n; i++) {
			const share = work[i]?.[k] ?? 0;
			if (i !== k) work[i] = (work[i] ?? []).map((value, j) => value - share * (work[k]?.[j] ?? 0));
		}
	}
	return work.map((row) => row.slice(n));
}

describe('signal in niche position', () => {
	// Exact fractions of the worked example of four species: root 247/120, MSE 491/2880, K 29271/17185, p 2/24.
	it('has the fractions of the worked example', () => {
		const { rootMean, quadratic } = pruneTraits(brownianTree(tree), positions);
		expect(rootMean).toBeCloseTo(247 / 120, 13);
		expect(quadratic / 3).toBeCloseTo(491 / 2880, 13);
		const tested = testK(tree, positions, options);
		expect(tested.k).toBeCloseTo(29_271 / 17_185, 12);
		expect(tested).toMatchObject({ exact: true, count: 24, asExtreme: 2, p: 2 / 24 });
		expect(independentContrasts(brownianTree(tree), positions).map(Math.abs)).toEqual(
			[0.212132034356, 0.293987366104, 0.616465539917].map((size): unknown => expect.closeTo(size, 11))
		);
	});

	// Likelihoods of the worked example: Brownian −3.753200414581, white noise −4.594901945734, λ at 1.
	it('has the likelihoods of the worked example, and no AICc where it is undefined', () => {
		const [brownian, noise, lambda] = traitModels(tree, trait);
		expect(brownian?.logLikelihood).toBeCloseTo(-3.753200414581, 11);
		expect(brownian?.aicc).toBeCloseTo(23.506401, 6);
		expect(noise?.logLikelihood).toBeCloseTo(-4.594901945734, 11);
		expect(noise?.aicc).toBeCloseTo(25.189804, 6);
		expect(lambda).toMatchObject({ estimate: 1, aicc: null, weight: null, atBound: true });
		expect(fitTrait(brownianTree(tree), trait).rate).toBeCloseTo(0.127864583333, 11);
		expect(fitTrait(noiseTree(tree), trait).rate).toBeCloseTo(0.5825, 12);
	});

	// By definition of each covariance with t the age of the common ancestor and T = 4, inverted by elimination.
	it.each([
		['Ornstein–Uhlenbeck', pulledTree(tree, 0.3), (t: number) => (Math.exp(-0.6 * t) - Math.exp(-2.4)) / 0.6],
		['early burst', burstTree(tree, -0.2), (t: number) => (Math.exp(-0.2 * (4 - t)) - 1) / -0.2]
	] as const)('reads %s on branches of other lengths as on its covariance', (_, branches, covariance) => {
		const direct = dense(covariance, positions);
		const pruned = pruneTraits(branches, positions);
		expect(pruned.rootMean).toBeCloseTo(direct.rootMean, 12);
		expect(pruned.quadratic).toBeCloseTo(direct.quadratic, 11);
		expect(pruned.rootVariance).toBeCloseTo(direct.rootVariance, 12);
	});

	// Property: on a star K is 1 whatever the trait.
	it('has K = 1 on a star', () => {
		const star = exampleTree('(A:2,B:2,C:2,D:2,E:2);');
		expect(blombergK(kScale(star), Float64Array.of(3, 9, -2, 0.5, 7))).toBeCloseTo(1, 12);
	});

	// Property: K and λ do not depend on the unit of trait or tree.
	it('does not depend on units', () => {
		const larger = { parent: tree.parent, ages: tree.ages.map((age) => 1000 * age) };
		const other = positions.map((x) => 7 - 3 * x);
		expect(testK(larger, other, options).k).toBeCloseTo(testK(tree, positions, options).k, 11);
		expect(pagelLambda(larger, { values: other, standardErrors: null }).lambda).toBeCloseTo(pagelLambda(tree, trait).lambda, 8);
	});

	// Closed form: with known errors and one common ancestor the covariance is s² + se²; an error of 0 is no error.
	it('adds the standard error of the mean to what evolution has spread', () => {
		const none = fitTrait(brownianTree(tree), { values: positions, standardErrors: new Float64Array(4) });
		const plain = fitTrait(brownianTree(tree), trait);
		expect(none.logLikelihood).toBeCloseTo(plain.logLikelihood, 9);
		const star = exampleTree('(A:1,B:1,C:1,D:1);');
		const withError = fitTrait(brownianTree(star), { values: positions, standardErrors: new Float64Array(4).fill(0.5) });
		expect(withError.rate).toBeCloseTo(0.5825 - 0.25, 6); // variance .5825 of the values, .25 of it error
	});

	it('refuses two species without a branch between them, unless errors are known', () => {
		const flat = exampleTree('((A:0,B:0):2,C:2,D:2);');
		expect(() => pruneTraits(brownianTree(flat), positions)).toThrow('Two species have no branch between them');
		const known = fitTrait(brownianTree(flat), { values: positions, standardErrors: new Float64Array(4).fill(0.2) });
		expect(Number.isFinite(known.logLikelihood)).toBe(true);
	});

	// Calibration: under exchangeability p is uniform on its steps; 400 traits, 99 % binomial interval of 0.05 is .024–.081.
	it('rejects at the nominal rate when species are exchangeable, and nearly always under a random walk', () => {
		const stream = randomStream(20, 0);
		const random = drawnTree(20, stream);
		const scale = brownianTree(random);
		let falsely = 0;
		let rightly = 0;
		for (let set = 0; set < 400; set++) {
			const noise = Float64Array.from({ length: 20 }, () => nextNormal(stream));
			if (testK(random, noise, { permutations: 99, seed: set, walks: 1 }).p <= 0.05) falsely++;
			const at = new Float64Array(random.parent.length);
			for (let node = 1; node < at.length; node++)
				at[node] = (at[random.parent[node] ?? 0] ?? 0) + Math.sqrt(scale.edges[node] ?? 0) * nextNormal(stream);
			const walk = Float64Array.from(scale.tips, (tip) => at[tip] ?? 0);
			if (testK(random, walk, { permutations: 99, seed: set, walks: 1 }).p <= 0.05) rightly++;
		}
		expect(falsely / 400).toBeGreaterThan(0.024);
		expect(falsely / 400).toBeLessThan(0.081);
		// Power of K for 20 species under a random walk was .98 in a simulation on other trees.
		expect(rightly / 400).toBeGreaterThan(0.85);
	});

	// The parametric p is uniform when the trait is itself a random walk: a K at its median gives about one half.
	it('finds a K of an ordinary random walk ordinary', () => {
		const tested = testK(tree, positions, { ...options, walks: 1999 });
		expect(tested.pAboveRandomWalk).toBeGreaterThan(0.05);
		expect(tested.pAboveRandomWalk).toBeLessThan(0.5);
	});
});

describe('maximiseOn', () => {
	it('finds the higher of two humps', () => {
		const humps = (x: number) => Math.exp(-((x - 0.2) ** 2) / 0.002) + 1.2 * Math.exp(-((x - 0.83) ** 2) / 0.002);
		expect(maximiseOn(humps, gridOf({ from: 0, to: 1, count: 41 })).at).toBeCloseTo(0.83, 6); // by construction
	});
});
