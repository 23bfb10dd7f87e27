import { describe, expect, it } from 'vitest';
import { linearRegression } from '#lib/statistics/linearRegression.ts';
import { multipleRegression } from '#lib/statistics/multipleRegression.ts';
import reference from '../../fixtures/reference/regressionNist.json' with { type: 'json' };

/** Digits in which two numbers agree: -log10 of the relative error, at most 15. NIST certifies 15. */
function digits(value: number, certified: number): number {
	if (value === certified) return 15;
	return Math.min(15, -Math.log10(certified === 0 ? Math.abs(value) : Math.abs((value - certified) / certified)));
}

const fewest = (values: readonly number[], certified: readonly number[]) =>
	Math.min(...certified.map((value, k) => digits(values[k] ?? Number.NaN, value)));

const caseNamed = (name: string) => {
	const found = reference.nist.find((each) => each.name === name);
	if (!found) throw new Error(`No reference case ${name}.`);
	return found;
};

/** The predictors of a case as columns; a single predictor of a polynomial model is raised to its powers. */
function columnsOf({ model, x }: ReturnType<typeof caseNamed>): number[][] {
	const rows = x.map((row) => (typeof row === 'number' ? [row] : row));
	const degree = Number(/x\^(\d+)$/.exec(model)?.[1] ?? 1);
	const width = rows[0]?.length ?? 0;
	if (width > 1) return Array.from({ length: width }, (_, k) => rows.map((row) => row[k] ?? Number.NaN));
	return Array.from({ length: degree }, (_, k) => rows.map((row) => (row[0] ?? Number.NaN) ** (k + 1)));
}

// Certified values: NIST Statistical Reference Datasets, linear regression (public domain).
describe('linearRegression', () => {
	it('agrees with the certified values of Norris to 11 digits', () => {
		const norris = caseNamed('Norris');
		const line = linearRegression(norris.x.map(Number), norris.y);
		const { parameters, residual_sd, r_squared } = norris.certified;
		const certified = parameters.map(({ estimate }) => estimate);
		expect(fewest([line.intercept, line.slope], certified)).toBeGreaterThan(11);
		expect(digits(line.residualStandardDeviation ?? Number.NaN, residual_sd)).toBeGreaterThan(11);
		expect(digits(line.rSquared, r_squared)).toBeGreaterThan(11);
	});

	// Anscombe (1973), and a made case of eight nodes; computed independently in R 4.2.2 by lm.
	it.each(reference.simple.filter((each) => each.slope !== undefined))('agrees with $name', (each) => {
		const line = linearRegression(each.x, each.y);
		expect(line.slope).toBeCloseTo(each.slope ?? Number.NaN, 12);
		expect(line.intercept).toBeCloseTo(each.intercept ?? Number.NaN, 12);
		if (each.r_squared !== undefined) expect(line.rSquared).toBeCloseTo(each.r_squared, 12);
	});
});

describe('multipleRegression', () => {
	// Digits asked of the coefficients, of their standard errors, and of the residual standard deviation. Wampler 1 and 2
	// fit exactly: certified errors are 0, so the last is asked in absolute terms. Filip's limit is in its columns: x^10 as a
	// double is off by 1e-16, the problem multiplies that by about 1e10.
	it.each([
		['Norris', 13, 13],
		['NoInt1', 14, 14],
		['Pontius', 13, 13],
		['Longley', 14, 13],
		['Wampler1', 14, 14],
		['Wampler2', 13, 13],
		['Wampler3', 14, 13],
		['Wampler4', 14, 13],
		['Wampler5', 14, 13],
		['Filip', 7, 7]
	])('agrees with the certified coefficients of %s to %d digits', (name, ofCoefficients, ofDeviations) => {
		const each = caseNamed(name);
		const { parameters, residual_sd } = each.certified;
		const fit = multipleRegression(columnsOf(each), each.y, { intercept: name !== 'NoInt1' });
		const estimates = parameters.map(({ estimate }) => estimate);
		const deviations = parameters.map(({ sd }) => sd);
		expect(fewest(fit.coefficients, estimates)).toBeGreaterThan(ofCoefficients);
		expect(fewest(fit.standardErrors, deviations)).toBeGreaterThan(ofDeviations);
		expect(digits(fit.residualStandardDeviation, residual_sd)).toBeGreaterThan(ofDeviations);
	});
});
