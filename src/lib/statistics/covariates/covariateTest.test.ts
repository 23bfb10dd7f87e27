import { describe, expect, it } from 'vitest';
import { multipleRegression } from '../multipleRegression.ts';
import { lowerTriangle, symmetricMatrix } from '../pairValues.ts';
import { shuffleBatches } from '../shuffleBatches.ts';
import { commonality } from './commonality.ts';
import { covariateDesign, type CovariateQuestion } from './covariateDesign.ts';
import { covariateTest } from './covariateTest.ts';

/** Pairs AB, AC, BC, AD, BD, CD of the four-species example; geo are distances along a line. Decided by exact arithmetic. */
const MICRO = {
	ages: { name: 'age', values: Float64Array.of(1, 2, 2, 4, 4, 4) },
	overlaps: Float64Array.of(0.8, 0.7, 0.6, 0.4, 0.4, 0.5),
	covariates: [{ name: 'distance', values: Float64Array.of(1, 3, 2, 7, 6, 4) }],
	tipCount: 4
};
const ASKED = { permutations: 999, seed: 1 };

describe('covariateDesign', () => {
	const design = covariateDesign(MICRO);

	// methods B, exact fractions: D = 606/685 − (45/548) age − (61/2740) geo; R² = 10147/10960.
	it('has the coefficients and R² of the four-species example', () => {
		expect(design.intercept).toBeCloseTo(606 / 685, 13);
		expect(design.coefficients.map(({ name }) => name)).toEqual(['age', 'distance']);
		expect(design.coefficients[0]?.estimate).toBeCloseTo(-45 / 548, 13);
		expect(design.coefficients[1]?.estimate).toBeCloseTo(-61 / 2740, 13);
		expect(design.rSquared).toBeCloseTo(10147 / 10960, 13);
	});

	// methods B: r(O,T) −0.952157431093, r(O,G) −0.916379589905, r(T,G) 0.898518905795.
	it('shares out R² between age and distance', () => {
		const parts = commonality(design);
		expect(parts.age).toBeCloseTo(10147 / 10960 - 0.916379589905 ** 2, 10);
		expect(parts.covariates).toBeCloseTo(10147 / 10960 - 0.952157431093 ** 2, 10);
		expect(parts.age + parts.covariates + parts.shared).toBeCloseTo(design.rSquared, 13);
		expect(design.coefficients[1]?.rWithAge).toBeCloseTo(0.898518905795, 11);
		// With one covariate the inflation of both is 1 / (1 − r²), by definition.
		for (const { varianceInflation } of design.coefficients) {
			expect(varianceInflation).toBeCloseTo(1 / (1 - 0.898518905795 ** 2), 8);
		}
	});

	// Property: the same least squares by another way, with the ordinary standard errors.
	it('agrees with the regression by QR on three predictors', () => {
		const question = madeUp(9, 3);
		const { coefficients, intercept, rSquared } = covariateDesign(question);
		const plain = multipleRegression(
			[question.ages, ...question.covariates].map(({ values }) => values),
			question.overlaps
		);
		expect(rSquared).toBeCloseTo(plain.rSquared, 12);
		expect(intercept).toBeCloseTo(plain.coefficients[0] ?? 0, 12);
		for (const [k, { estimate, t }] of coefficients.entries()) {
			expect(estimate).toBeCloseTo(plain.coefficients[k + 1] ?? 0, 12);
			expect(t).toBeCloseTo((plain.coefficients[k + 1] ?? 0) / (plain.standardErrors[k + 1] ?? 1), 9);
		}
	});
});

describe('covariateTest', () => {
	// methods B: partial r(O,T|G) −0.732871807619; whole overlaps moved 2 of 24, residuals moved 3 of 24.
	it('has the partial correlation and both counts of the four-species example', () => {
		const outcome = covariateTest(covariateDesign(MICRO), ASKED);
		expect(outcome.r).toBeCloseTo(-0.732871807619, 11);
		expect(outcome).toMatchObject({ exact: true, count: 24 });
		expect(outcome.raw).toMatchObject({ less: 2, pLess: 2 / 24 });
		expect(outcome.residual).toMatchObject({ less: 3, pLess: 3 / 24 });
	});

	// Property: every arrangement, each statistic by a whole regression of its own, as the papers describe them.
	it.each([1, 2])('counts as plain regressions of every arrangement do, with %i covariates', (count) => {
		const question = madeUp(5, count);
		const outcome = covariateTest(covariateDesign(question), ASKED);
		const expected = byPlainRegressions(question);
		expect(outcome.count).toBe(120);
		expect(counted(outcome.raw)).toEqual(expected.raw);
		expect(counted(outcome.residual)).toEqual(expected.residual);
		expect(outcome.coefficients.map(counted)).toEqual(expected.coefficients);
		expect(outcome.pOfRSquared).toBe(expected.rSquared / 120);
		expect(outcome.pOfAgePart).toBe((expected.coefficients[0]?.farther ?? 0) / 120);
	});

	it('draws the same for the same seed and differs for another', () => {
		const design = covariateDesign(madeUp(12, 2));
		const run = (seed: number) => covariateTest(design, { permutations: 600, seed });
		expect(run(7)).toEqual(run(7));
		expect(run(7)).not.toEqual(run(8));
		expect(run(7)).toMatchObject({ exact: false, count: 600 });
	});

	// Property: neither shifting nor stretching a predictor or the overlaps changes what is tested.
	it('gives the same p whatever the units', () => {
		const question = madeUp(10, 1);
		const stretched = {
			...question,
			overlaps: question.overlaps.map((value) => 3 * value + 5),
			ages: { name: 'age', values: question.ages.values.map((value) => 1000 * value + 7) },
			covariates: question.covariates.map(({ name, values }) => ({ name, values: values.map((value) => value / 64) }))
		};
		const [one, other] = [question, stretched].map((asked) => covariateTest(covariateDesign(asked), ASKED));
		expect(other?.raw).toEqual(one?.raw);
		expect(other?.residual).toEqual(one?.residual);
		expect(other?.coefficients).toEqual(one?.coefficients);
	});

	// methods 10: a covariate that goes with nothing leaves r as it is. Here it is made to be uncorrelated with both exactly.
	it('leaves r as it is beside a covariate that goes with neither age nor overlap', () => {
		const question = madeUp(8, 1);
		const [first] = question.covariates;
		const pair = [question.ages.values, question.overlaps];
		const unrelated = multipleRegression(pair, first?.values ?? []).residuals;
		const { r } = covariateTest(covariateDesign({ ...question, covariates: [{ name: 'unrelated', values: unrelated }] }), ASKED);
		const plain = covariateDesign(question).rSquaredOfAge;
		expect(r * r).toBeCloseTo(plain, 10);
	});

	it('gives no p below the whole when the predictors explain every overlap', () => {
		const { ages, covariates, tipCount } = madeUp(6, 1);
		const overlaps = ages.values.map((age, pair) => 2 - 0.1 * age - 0.2 * (covariates[0]?.values[pair] ?? 0));
		const design = covariateDesign({ ages, covariates, tipCount, overlaps });
		expect(design.coefficients.map(({ t }) => t)).toEqual([null, null]);
		const { pOfRSquared } = covariateTest(design, ASKED);
		// By hand: only the identity reaches R² = 1 for these unequal values, one of 720.
		expect(pOfRSquared).toBe(1 / 720);
	});
});

type Counts = { less: number; greater: number; farther: number };

function counted({ less, greater, farther }: Counts): Counts {
	return { less, greater, farther };
}

/** Values without structure, by a fixed recurrence. */
function madeUp(tipCount: number, covariateCount: number): CovariateQuestion {
	let state = 12_345;
	const next = () => {
		state = (state * 1103 + 4721) % 65_521;
		return state / 65_521;
	};
	const pairs = (tipCount * (tipCount - 1)) / 2;
	const drawn = () => Float64Array.from({ length: pairs }, next);
	const covariates = Array.from({ length: covariateCount }, (_, k) => ({ name: `covariate ${k + 1}`, values: drawn() }));
	return { tipCount, covariates, ages: { name: 'age', values: drawn() }, overlaps: drawn() };
}

function byPlainRegressions({ overlaps, ages, covariates, tipCount }: CovariateQuestion) {
	const predictors = [ages, ...covariates].map(({ values }) => values);
	const others = predictors.map((_, j) => predictors.filter((_column, k) => k !== j));
	const residuals = predictors.map((column, j) => multipleRegression(others[j] ?? [], column).residuals);
	const leftOfOverlap = multipleRegression(others[0] ?? [], overlaps).residuals;
	const statisticsOf = (arrangement: Int32Array) => {
		const move = (lower: Float64Array) => moved(lower, arrangement);
		return [
			tOfFirst(predictors, move(overlaps)),
			tOfFirst(predictors, move(leftOfOverlap)),
			multipleRegression(predictors, move(overlaps)).rSquared,
			...residuals.map((column, j) => tOfFirst([move(column), ...(others[j] ?? [])], overlaps))
		];
	};
	const groups = [{ from: 0, to: tipCount }];
	let observed: number[] | undefined;
	const counts: Counts[] = [];
	for (const { count, arrangements } of shuffleBatches({ tipCount, groups, domain: 0, seed: 0, permutations: 1 })) {
		for (let k = 0; k < count; k++) {
			const values = statisticsOf(arrangements.subarray(k * tipCount, (k + 1) * tipCount));
			observed ??= values;
			for (const [s, value] of values.entries()) {
				const tally = (counts[s] ??= { less: 0, greater: 0, farther: 0 });
				const seen = observed[s] ?? 0;
				tally.less += value <= seen + 1e-9 ? 1 : 0;
				tally.greater += value >= seen - 1e-9 ? 1 : 0;
				tally.farther += Math.abs(value) >= Math.abs(seen) - 1e-9 ? 1 : 0;
			}
		}
	}
	const [raw, residual, rSquared, ...coefficients] = counts;
	return { raw, residual, rSquared: rSquared?.greater ?? 0, coefficients };
}

function tOfFirst(columns: readonly Float64Array[], y: Float64Array): number {
	const { coefficients, standardErrors } = multipleRegression(columns, y);
	return (coefficients[1] ?? 0) / (standardErrors[1] ?? 1);
}

function moved(lower: Float64Array, arrangement: Int32Array): Float64Array {
	const n = arrangement.length;
	const whole = symmetricMatrix(lower, n, 0);
	const values = new Float64Array(n * n);
	for (let i = 0; i < n; i++) {
		for (let j = 0; j < n; j++) values[i * n + j] = whole[(arrangement[i] ?? 0) * n + (arrangement[j] ?? 0)] ?? 0;
	}
	return lowerTriangle(values, n);
}
