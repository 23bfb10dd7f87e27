import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from '../assertAllFinite.ts';
import { identityArrangement } from '../arrangements.ts';
import { compensatedDot, compensatedSum } from '../compensatedSum.ts';
import { assertOverlapsVary } from '../linearRegression.ts';
import { crossSumInput, crossSumsInPlace, type CrossSumInput } from './crossSums.ts';
import { lengthOf, predictorBasis, type Predictor } from './predictorBasis.ts';

/** One coefficient of the regression on all predictors. */
export type Coefficient = {
	readonly name: string;
	/** overlap per unit of the predictor */
	readonly estimate: number;
	/** null where the predictors explain every overlap, so that nothing is left to measure by */
	readonly t: number | null;
	/** how many times more the coefficient varies than if the predictors were unrelated; at least 1 */
	readonly varianceInflation: number;
	/** null for age itself */
	readonly rWithAge: number | null;
};

/** Everything the shuffles read; vectors over the K predictors are in the basis `crossSums` moves, age last. */
export type CovariateDesign = {
	readonly sums: CrossSumInput;
	/** overlap about its mean in the basis */
	readonly shares: Float64Array;
	/** squared length of overlap about its mean is 1: everything is counted in units of it */
	readonly own: readonly Float64Array[];
	/** sums of the observed arrangement, by the same kernel as every shuffle: so the identity always ties with itself */
	readonly observed: Float64Array;
	readonly intercept: number;
	/** age first, then the covariates in order */
	readonly coefficients: readonly Coefficient[];
	readonly rSquared: number;
	/** R² of age alone, and of the covariates without age */
	readonly rSquaredOfAge: number;
	readonly rSquaredOfCovariates: number;
};

export type CovariateQuestion = {
	/** strict lower triangles, row by row, tree order */
	readonly overlaps: Float64Array;
	readonly ages: Predictor;
	readonly covariates: readonly Predictor[];
	readonly tipCount: number;
};

/** A share of the overlaps below this is rounding. */
const NOTHING_LEFT = 1e-12;

/**
 * Overlap regressed on age and covariates over all pairs, made ready for the shuffles of `covariateTest`.
 *
 * Pairs share species, so the coefficients describe and carry no standard error; t is a scale-free measure of them that
 * only the shuffles may judge.
 *
 * @throws {InputError} `collinear`, `constant-predictor`, `constant-overlap`, `non-finite`; `too-many-covariates` for the
 * pairs there are; `explained-by-covariates` when nothing is left for age to explain
 */
export function covariateDesign({ overlaps, ages, covariates, tipCount }: CovariateQuestion): CovariateDesign {
	assertAllFinite(overlaps, 'overlap of pair');
	assertOverlapsVary(overlaps);
	// Age is refused by its own sentence elsewhere, so a covariate that equals it is the one to name: age goes in first …
	predictorBasis([ages, ...covariates]);
	refuseTooMany(overlaps.length, covariates.length);
	// … and last in the basis proper, where its column is what age has of its own.
	const basis = predictorBasis([...covariates, ages]);
	const mean = compensatedSum(overlaps) / overlaps.length;
	const centred = overlaps.map((value) => value - mean);
	const length = lengthOf(centred);
	const response = centred.map((value) => value / length);
	const sums = crossSumInput(basis.columns, [response, ...basis.columns], tipCount);
	const observed = new Float64Array(sums.fixedCount * sums.movedCount);
	crossSumsInPlace(observed, sums, identityArrangement(tipCount));
	const shares = Float64Array.from(basis.columns, (column) => compensatedDot(column, response));
	const inverse = inverseRows(basis.r);
	const rSquaredOfCovariates = sumOfSquares(shares.subarray(0, -1));
	if (1 - rSquaredOfCovariates <= NOTHING_LEFT) throw explained(covariates);
	const rSquared = Math.min(1, sumOfSquares(shares));
	const leftOver = (1 - rSquared) / (overlaps.length - basis.names.length - 1);
	const estimates = inverse.map((row) => length * compensatedDot(row, shares));
	const coefficients = basis.names.map((name, j): Coefficient => {
		const spread = lengthOf(inverse[j] ?? new Float64Array(0));
		const isAge = j === basis.names.length - 1;
		return {
			name,
			estimate: estimates[j] ?? 0,
			t: 1 - rSquared <= NOTHING_LEFT ? null : (estimates[j] ?? 0) / (length * spread * Math.sqrt(leftOver)),
			varianceInflation: Math.max(1, (spread * columnLength(basis.r, j)) ** 2),
			rWithAge: isAge ? null : correlationWithLast(basis.r, j)
		};
	});
	return {
		sums,
		shares,
		own: inverse.map((row) => row.map((value) => value / lengthOf(row))),
		observed,
		intercept: mean - compensatedDot(estimates, basis.means),
		coefficients: [...coefficients.slice(-1), ...coefficients.slice(0, -1)],
		rSquared,
		rSquaredOfAge: rSquaredOfLast(basis.r, shares),
		rSquaredOfCovariates
	};
}

function refuseTooMany(pairs: number, count: number): void {
	if (count === 0) throw new Error('A design with covariates needs one.');
	if (pairs > count + 2) return;
	throw new InputError(
		'too-many-covariates',
		`${pairs} pairs allow age and at most ${pairs - 3} covariates; the plan has ${count}. Leave some out.`
	);
}

function explained(covariates: readonly Predictor[]): InputError {
	const names = covariates.map(({ name }) => `“${name}”`).join(', ');
	return new InputError(
		'explained-by-covariates',
		`The overlaps are a linear function of ${names}: nothing is left for age to explain. Was the covariate made from the overlaps? Leave it out.`
	);
}

/** Rows of the inverse of an upper triangular matrix. Row j is, up to its length, what predictor j has of its own. */
function inverseRows(r: readonly (readonly number[])[]): Float64Array[] {
	const size = r.length;
	const rows = r.map(() => new Float64Array(size));
	for (let column = 0; column < size; column++) {
		for (let row = column; row >= 0; row--) {
			let sum = row === column ? 1 : 0;
			for (let k = row + 1; k <= column; k++) sum -= (r[row]?.[k] ?? 0) * (rows[k]?.[column] ?? 0);
			const target = rows[row];
			if (target) target[column] = sum / (r[row]?.[row] ?? 1);
		}
	}
	return rows;
}

function sumOfSquares(values: Float64Array): number {
	return compensatedDot(values, values);
}

function columnOf(r: readonly (readonly number[])[], j: number): Float64Array {
	return Float64Array.from(r, (row) => row[j] ?? 0);
}

function columnLength(r: readonly (readonly number[])[], j: number): number {
	return lengthOf(columnOf(r, j));
}

function correlationWithLast(r: readonly (readonly number[])[], j: number): number {
	const last = r.length - 1;
	const cosine = compensatedDot(columnOf(r, j), columnOf(r, last)) / (columnLength(r, j) * columnLength(r, last));
	return Math.max(-1, Math.min(1, cosine));
}

function rSquaredOfLast(r: readonly (readonly number[])[], shares: Float64Array): number {
	const last = columnOf(r, r.length - 1);
	return (compensatedDot(last, shares) / lengthOf(last)) ** 2;
}
