import { describe, expect, it } from 'vitest';
import type { AnalysisInputs, CovariateInput } from '#lib/contracts/compute.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { previewAnalysis } from '../previewAnalysis.ts';

/** The worked example: positions 0, 1, 3, 7 on a line, here in the order D, A, B, C under names that need tidying. */
const DISTANCE: CovariateInput = {
	label: 'distance',
	species: ['D', 'A', 'B', 'C'],
	lower: Float64Array.of(7, 6, 1, 4, 3, 2),
	remarks: [],
	kind: 'distance',
	scale: 'plain'
};
const asked = microPlan({ covariates: ['c'] });

function allowingFor(change: Partial<CovariateInput>, inputs: Partial<AnalysisInputs> = {}): AnalysisInputs {
	return { ...MICRO_INPUTS, ...inputs, covariates: [{ ...DISTANCE, ...change }] };
}

describe('covariatesBlock', () => {
	it('is absent unless the plan allows for something', () => {
		const result = analyse(MICRO_INPUTS, microPlan());
		expect(result.partial).toBeUndefined();
		expect(result.matrixRegression).toBeUndefined();
	});

	// Exact fractions of the worked example; residuals moved 3 of 24, whole overlaps 2 of 24.
	it('has the numbers of the worked example whatever the order of the covariate', () => {
		const { partial, matrixRegression } = analyse(allowingFor({}), asked);
		expect(partial).toMatchObject({ p: 3 / 24, pLess: 3 / 24, raw: { p: 2 / 24 }, exact: true, count: 24 });
		expect(partial?.r).toBeCloseTo(-0.732871807619, 11);
		expect(matrixRegression?.intercept).toBeCloseTo(606 / 685, 12);
		expect(matrixRegression?.coefficients.map(({ name }) => name)).toEqual(['age', 'distance']);
		expect(matrixRegression?.coefficients.map(({ estimate }) => estimate)).toEqual(
			[-45 / 548, -61 / 2740].map((value) => expect.closeTo(value, 12))
		);
		expect(matrixRegression?.rSquared).toBeCloseTo(10147 / 10960, 12);
	});

	it('reads the tail that the plan declared', () => {
		const risen = analyse(allowingFor({}), microPlan({ covariates: ['c'], alternative: 'greater' })).partial;
		expect(risen?.p).toBe(risen?.pGreater);
		expect(risen?.p).toBeGreaterThan(0.8);
	});

	it('takes the logarithm of age where the plan is judged by it', () => {
		const { matrixRegression } = analyse(allowingFor({}), microPlan({ covariates: ['c'], statistic: 'slope-log-age' }));
		expect(matrixRegression?.ageScale).toBe('log2');
		// By hand: log2 of the ages is 0, 1, 1, 2, 2, 2; with distances 1, 3, 2, 7, 6, 4: Sxy 25/3, Sxx 10/3, Syy 161/6.
		expect(matrixRegression?.coefficients[1]?.rWithAge).toBeCloseTo(25 / Math.sqrt(805), 12);
	});

	it('matches names by the decision that the matrix has, and by its own spelling', () => {
		const renamed: Partial<AnalysisInputs> = {
			overlap: { ...MICRO_INPUTS.overlap, species: ['A', 'B', 'C', 'old name'] },
			decisions: [{ from: 'old name', to: 'D' }]
		};
		for (const name of ['old name', 'D']) {
			const { partial } = analyse(allowingFor({ species: [name, 'A', 'B', 'C'] }, renamed), asked);
			expect(partial?.p).toBe(3 / 24);
		}
	});

	const gap = Float64Array.of(7, NaN, 1, 4, 3, 2);
	it.each([
		[
			'without a species',
			allowingFor({ species: ['E', 'A', 'B', 'C'] }),
			'“distance” has no values for one of the species compared: D.'
		],
		['without a pair', allowingFor({ lower: gap }), '1 pair has no value in “distance”. An analysis needs every pair: leave out'],
		['that repeats age', allowingFor({ lower: Float64Array.of(8, 8, 2, 8, 4, 4) }), '“distance” is a linear function of “age”'],
		[
			'that has an open question',
			allowingFor({ remarks: [{ level: 'settle', code: 'asymmetric', message: 'The two halves differ.' }] }),
			'“distance”: The two halves differ.'
		]
	])('refuses a covariate %s before anything runs', (_, inputs, sentence) => {
		expect(() => previewAnalysis(inputs, asked)).toThrow(sentence);
	});
});
