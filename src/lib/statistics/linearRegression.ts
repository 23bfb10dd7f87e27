import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from './assertAllFinite.ts';
import { compensatedSum } from './compensatedSum.ts';

export type Line = { readonly slope: number; readonly intercept: number; readonly rSquared: number };

export type LinearRegression = Line & {
	readonly r: number;
	/** null with two points, which any line fits */
	readonly residualStandardDeviation: number | null;
};

/** Ages that differ by no more than this share of the oldest are one age: the rounding of a tree file is about 1e-10. */
const AGE_TOLERANCE = 1e-9;
/** Overlaps that differ by no more than this share of the largest are one value: rounding of their own computation. */
const OVERLAP_TOLERANCE = 1e-12;

/**
 * Least-squares line of overlap on age, from centred and compensated sums. The residual standard deviation describes
 * the scatter; pairs share species, so no standard error or p-value of the slope may be made from it.
 *
 * @param ages - shape (points,); unit of the tree
 * @param overlaps - shape (points,); dimensionless
 * @returns slope in overlap per unit of age, intercept in overlap, r in [-1, 1], rSquared in [0, 1]
 * @throws {InputError} `non-finite`; `too-few-points` below 2; `constant-ages` or `constant-overlap` without variation
 */
export function linearRegression(ages: ArrayLike<number>, overlaps: ArrayLike<number>): LinearRegression {
	assertPoints(ages, overlaps);
	assertOverlapsVary(overlaps);
	const { slope, intercept, sums } = fit(ages, overlaps);
	const { sxx, sxy, syy, residual } = sums;
	const degrees = ages.length - 2;
	return {
		slope,
		intercept,
		r: Math.max(-1, Math.min(1, sxy / Math.sqrt(sxx * syy))),
		rSquared: Math.max(0, 1 - residual / syy),
		residualStandardDeviation: degrees > 0 ? Math.sqrt(residual / degrees) : null
	};
}

/**
 * The same line where a constant response is an answer, not a fault: averages of different overlaps may agree at every
 * node. Then the slope is 0 and rSquared is 0, nothing being there to explain.
 *
 * @throws {InputError} as `linearRegression`, without `constant-overlap`
 */
export function fitLine(x: ArrayLike<number>, y: ArrayLike<number>): Line {
	assertPoints(x, y);
	const { slope, intercept, sums } = fit(x, y);
	if (isConstant(y, OVERLAP_TOLERANCE)) return { slope: 0, intercept: compensatedSum(y) / y.length, rSquared: 0 };
	return { slope, intercept, rSquared: Math.max(0, 1 - sums.residual / sums.syy) };
}

/** @throws {InputError} `constant-ages` when all are one age */
export function assertAgesVary(ages: ArrayLike<number>): void {
	if (!isConstant(ages, AGE_TOLERANCE)) return;
	throw new InputError(
		'constant-ages',
		`Expected ages that differ; all ${ages.length} are ${ages[0]}. A tree whose species all part at once has no slope: bring a resolved tree.`
	);
}

/** @throws {InputError} `constant-overlap` when all are one value */
export function assertOverlapsVary(overlaps: ArrayLike<number>): void {
	if (!isConstant(overlaps, OVERLAP_TOLERANCE)) return;
	throw new InputError(
		'constant-overlap',
		`Expected overlaps that differ; all ${overlaps.length} are ${overlaps[0]}. A slope and a correlation need variation: check the matrix.`
	);
}

function assertPoints(x: ArrayLike<number>, y: ArrayLike<number>): void {
	if (x.length !== y.length) throw new Error(`A line needs as many ages as overlaps; got ${x.length} and ${y.length}.`);
	if (x.length < 2) throw new InputError('too-few-points', `Expected at least 2 points for a line; got ${x.length}.`);
	assertAllFinite(x, 'age');
	assertAllFinite(y, 'overlap');
	assertAgesVary(x);
}

function isConstant(values: ArrayLike<number>, tolerance: number): boolean {
	let lowest = Number.POSITIVE_INFINITY;
	let highest = Number.NEGATIVE_INFINITY;
	for (let i = 0; i < values.length; i++) {
		lowest = Math.min(lowest, values[i] ?? 0);
		highest = Math.max(highest, values[i] ?? 0);
	}
	return highest - lowest <= tolerance * Math.max(Math.abs(lowest), Math.abs(highest));
}

/** The corrected two-pass form: what rounding leaves of the sums of deviations is taken out of their products. */
function fit(x: ArrayLike<number>, y: ArrayLike<number>) {
	const count = x.length;
	const meanX = compensatedSum(x) / count;
	const meanY = compensatedSum(y) / count;
	const dx = Float64Array.from(x, (value) => value - meanX);
	const dy = Float64Array.from(y, (value) => value - meanY);
	const leftX = compensatedSum(dx);
	const leftY = compensatedSum(dy);
	const sxx = compensatedSum(dx.map((d) => d * d)) - (leftX * leftX) / count;
	const syy = compensatedSum(dy.map((d) => d * d)) - (leftY * leftY) / count;
	const sxy = compensatedSum(dx.map((d, i) => d * (dy[i] ?? 0))) - (leftX * leftY) / count;
	const slope = sxy / sxx;
	const residual = compensatedSum(dx.map((d, i) => ((dy[i] ?? 0) - slope * d) ** 2));
	return { slope, intercept: meanY - slope * meanX, sums: { sxx, sxy, syy, residual } };
}
