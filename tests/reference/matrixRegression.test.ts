import { describe, expect, it } from 'vitest';
import { covariateDesign } from '#lib/statistics/covariates/covariateDesign.ts';
import { covariateTest } from '#lib/statistics/covariates/covariateTest.ts';
import reference from '../../fixtures/reference/mantel.json' with { type: 'json' };

const SHUFFLES = 20_000;
const ASKED = { permutations: SHUFFLES, seed: 1 };

/** The fixtures go down the columns of the lower triangle, ours along its rows. */
function byRows(byColumns: readonly number[], n: number): Float64Array {
	const lower = new Float64Array((n * (n - 1)) / 2);
	let pair = 0;
	for (let j = 0; j < n; j++) for (let i = j + 1; i < n; i++) lower[(i * (i - 1)) / 2 + j] = byColumns[pair++] ?? Number.NaN;
	return lower;
}

/** 4 standard errors of two Monte Carlo values, and the one count that both add; an exact value is met exactly. */
function expectNear(p: number, stored: number, { exact, error = 0 }: { exact: boolean; error?: number }): void {
	if (exact) expect(p).toBeCloseTo(stored, 14);
	else expect(Math.abs(p - stored)).toBeLessThan(4 * (Math.sqrt((stored * (1 - stored)) / SHUFFLES) + error) + 1 / SHUFFLES);
}

// Statistics and counts computed independently in R and C; the stored p moves the whole response.
describe.each(reference.partial)('the partial Mantel test of $name', ({ n, x_lower, y_lower, z_lower, pearson }) => {
	const [overlaps, ages, covariate] = [x_lower, y_lower, z_lower].map((lower) => byRows(lower, n));
	const given = [{ name: 'covariate', values: covariate ?? new Float64Array() }];
	const design = covariateDesign({
		overlaps: overlaps ?? new Float64Array(),
		ages: { name: 'age', values: ages ?? new Float64Array() },
		covariates: given,
		tipCount: n
	});
	const outcome = covariateTest(design, ASKED);
	const exact = n === 7;

	it('has the reference correlation', () => {
		expect(outcome.r).toBeCloseTo(pearson.statistic, 12);
	});

	it('has the reference tails', () => {
		expect(outcome.exact).toBe(exact);
		expectNear(outcome.raw.pGreater, pearson.p_upper, { exact, error: pearson.mc_se_upper });
		expectNear(outcome.raw.pLess, pearson.p_lower, { exact, error: pearson.mc_se_lower });
	});
});

type Regression = (typeof reference.mrm)[number] & { readonly x3_lower?: readonly number[] };

// As above: coefficients, R² and t by lm; p of R² and of |t| with the whole response moved, each predictor in the place of age.
describe.each<Regression>(reference.mrm)('the regression on matrices of $name', (stored) => {
	const { n, terms, permutation } = stored;
	const predictors = [stored.x1_lower, stored.x2_lower, ...(stored.x3_lower ? [stored.x3_lower] : [])].map((lower, k) => ({
		name: terms[k + 1] ?? '',
		values: byRows(lower, n)
	}));
	const designs = predictors.map((focal) =>
		covariateDesign({
			overlaps: byRows(stored.y_lower, n),
			ages: focal,
			covariates: predictors.filter((predictor) => predictor !== focal),
			tipCount: n
		})
	);

	it('has the reference coefficients, t and R²', () => {
		for (const [k, { coefficients, intercept, rSquared }] of designs.entries()) {
			expect(coefficients[0]?.estimate).toBeCloseTo(stored.coefficients[k + 1] ?? 0, 12);
			expect(coefficients[0]?.t).toBeCloseTo(stored.t_naive[k + 1] ?? 0, 9);
			expect(intercept).toBeCloseTo(stored.coefficients[0] ?? 0, 11);
			expect(rSquared).toBeCloseTo(stored.r_squared, 12);
		}
	});

	it('has the reference p of R² and of every t, the whole response moved', () => {
		const exact = permutation.exact;
		for (const [k, design] of designs.entries()) {
			const { raw, pOfRSquared, count } = covariateTest(design, ASKED);
			const pOfT = exact ? raw.farther / count : (raw.farther + 1) / (count + 1);
			expectNear(pOfT, permutation.p_terms_abs_t[k + 1] ?? 0, { exact });
			expectNear(pOfRSquared, permutation.p_r_squared, { exact });
		}
	});
});

// R 4.2.2, all 5,040 arrangements p of seven species, by lm: for a predictor x beside z with e <- resid(lm(x ~ z)) as a matrix,
// the t of lm(y ~ e[p, p] + z); for residuals, e <- resid(lm(y ~ z)) and the t of x in lm(e[p, p] ~ x + z). Ties within 1e-9.
describe('double semi-partialing and residual shuffles of seven species', () => {
	const stored = reference.mrm.find(({ name }) => name === 'exact7_mrm');
	if (stored === undefined) throw new Error('The reference holds the case of seven species.');
	const design = covariateDesign({
		overlaps: byRows(stored.y_lower, 7),
		ages: { name: 'age', values: byRows(stored.x1_lower, 7) },
		covariates: [{ name: 'distance', values: byRows(stored.x2_lower, 7) }],
		tipCount: 7
	});
	const outcome = covariateTest(design, ASKED);

	it('counts as many arrangements as R', () => {
		expect(outcome.coefficients[0]).toMatchObject({ less: 4718, greater: 323, farther: 576 });
		expect(outcome.coefficients[1]).toMatchObject({ less: 117, greater: 4924, farther: 366 });
		expect(outcome.residual).toMatchObject({ less: 4707, greater: 334, farther: 562 });
		expect(outcome.raw).toMatchObject({ less: 4611, greater: 430, farther: 714 });
	});

	it('has the parts of R² and the inflation that R has', () => {
		expect(design.rSquaredOfAge).toBeCloseTo(0.092950619049068, 13);
		expect(design.rSquaredOfCovariates).toBeCloseTo(0.142987467430603, 13);
		expect(design.coefficients[1]?.varianceInflation).toBeCloseTo(1.001698643210717, 12);
		expect(design.coefficients[1]?.rWithAge).toBeCloseTo(0.041179639567324, 12);
	});
});
