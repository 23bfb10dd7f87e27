import { describe, expect, it } from 'vitest';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan, microResult } from '../microResult.fixture.ts';
import { covariateCaution, covariateSentence, formatPoints } from './covariateSentence.ts';

const covariate = { label: 'distance', species: ['A', 'B', 'C', 'D'], remarks: [], kind: 'distance', scale: 'plain' } as const;
const inputs = { ...MICRO_INPUTS, covariates: [{ ...covariate, lower: Float64Array.of(1, 3, 2, 7, 6, 4) }] };

function told(change: {
	p?: number;
	r?: number;
	inflation?: number;
	alternative?: 'less' | 'greater' | 'two-sided';
}): AnalysisResult {
	const result = analyse(inputs, microPlan({ covariates: ['c'], alternative: change.alternative ?? 'less' }));
	const { partial, matrixRegression } = result;
	if (partial === undefined || matrixRegression === undefined) throw new Error('Expected what the plan asked for.');
	const [age, ...others] = matrixRegression.coefficients;
	if (age === undefined) throw new Error('Expected a coefficient of age.');
	return {
		...result,
		partial: { ...partial, p: change.p ?? partial.p, r: change.r ?? partial.r },
		matrixRegression: {
			...matrixRegression,
			coefficients: [{ ...age, varianceInflation: change.inflation ?? age.varianceInflation }, ...others]
		}
	};
}

describe('covariateSentence', () => {
	it('is absent where the plan allows for nothing', () => {
		expect(covariateSentence(microResult())).toBeNull();
		expect(covariateCaution(microResult())).toBeNull();
	});

	// The worked example: partial r −0.7329, 3 of 24; age alone 10147/10960 − 0.91638² = 8.6 %.
	it('says what was detected, with the numbers of the worked example', () => {
		expect(covariateSentence(told({}))).toMatch(
			/^After allowing for “distance”, which does not remove spatial structure, no fall of overlap with age was detected \(partial r = −0\.73, p = 0\.13\)\. Age alone explains 8\.6 % of the variation among pairs, p = 0\.\d+\.$/
		);
	});

	it('says that overlap still falls or rises only within the level', () => {
		expect(covariateSentence(told({ p: 0.01 }))).toContain('overlap still falls with age');
		expect(covariateSentence(told({ p: 0.01, r: 0.4, alternative: 'greater' }))).toContain('overlap still rises with age');
		expect(covariateSentence(told({ p: 0.01, r: 0.4, alternative: 'two-sided' }))).toContain('overlap still rises with age');
		expect(covariateSentence(told({ p: 0.4, alternative: 'two-sided' }))).toContain('no change of overlap with age was detected');
	});
});

describe('covariateCaution', () => {
	it('always cites how often these tests err without any evolution of niches', () => {
		expect(covariateCaution(told({}))).toContain(
			'in 36 to 67 % of cases and the tests that allow for distance still did in 11 to 23 %'
		);
	});

	it('names the covariate that goes with age when inflation is high, and not otherwise', () => {
		// r of age and distance in the worked example: 0.8985.
		expect(covariateCaution(told({ inflation: 12 }))).toMatch(
			/^Age and the covariates go together \(variance inflation 12; r of age and “distance” 0\.90\)/
		);
		expect(covariateCaution(told({ inflation: 9 }))).toMatch(/^In simulations/);
	});
});

// By hand.
describe('formatPoints', () => {
	it('writes a part of R² with one decimal, and no minus before a zero', () => {
		expect([0.1124, 0, -0.0004, -0.0006, -0.02].map(formatPoints)).toEqual(['11.2 %', '0.0 %', '0.0 %', '−0.1 %', '−2.0 %']);
	});
});
