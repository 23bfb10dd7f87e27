import { InputError } from '#lib/remarks/inputError.ts';
import { assertAllFinite } from '../assertAllFinite.ts';
import { compensatedDot, compensatedSum } from '../compensatedSum.ts';

/** Values of every pair: the strict lower triangle, row by row, in tree order. */
export type Predictor = { readonly name: string; readonly values: Float64Array };

/** The space of the predictors, each taken about its mean: x = mean + Q r, with the columns of Q orthogonal and of length 1. */
export type PredictorBasis = {
	readonly names: readonly string[];
	readonly means: readonly number[];
	/** K columns of shape (pairs,) */
	readonly columns: readonly Float64Array[];
	/** upper triangular, shape (K, K), row by row: predictor j in terms of the columns */
	readonly r: readonly (readonly number[])[];
};

/** Largest part of a predictor, as a share of its variance, that counts as nothing of its own: the rounding of printed matrices. */
const OWN_SHARE = 1e-6;
/** A predictor whose spread is below this share of its size does not vary. */
const CONSTANT_SHARE = 1e-12;

/**
 * An orthonormal basis of the predictors by Gram and Schmidt's procedure, every column cleared twice, which leaves
 * rounding only.
 *
 * @throws {InputError} `constant-predictor`, `collinear` with the names of those that say the same, `non-finite`
 * @see Björck (1994), doi:10.1016/0024-3795(94)90493-6, on clearing twice
 */
export function predictorBasis(predictors: readonly Predictor[]): PredictorBasis {
	const columns: Float64Array[] = [];
	const means: number[] = [];
	const shares: number[][] = [];
	const centred: Float64Array[] = [];
	for (const [k, { name, values }] of predictors.entries()) {
		assertAllFinite(values, `“${name}” of pair`);
		const mean = compensatedSum(values) / values.length;
		const column = values.map((value) => value - mean);
		const length = lengthOf(column);
		refuseConstant(name, values, length);
		means.push(mean);
		centred.push(column);
		const own = Float64Array.from(column);
		const parts = clearTwice(own, columns);
		const left = lengthOf(own);
		if (left * left <= OWN_SHARE * length * length) throw collinear(predictors, centred, k);
		shares.push([...parts, left]);
		columns.push(own.map((value) => value / left));
	}
	const r = predictors.map((_, row) => shares.map((parts) => parts[row] ?? 0));
	return { names: predictors.map(({ name }) => name), means, columns, r };
}

/** Takes the columns out of a vector; returns how much of each was in it. */
function clearTwice(vector: Float64Array, columns: readonly Float64Array[]): number[] {
	const parts = columns.map(() => 0);
	for (let round = 0; round < 2; round++) {
		for (const [k, column] of columns.entries()) {
			const part = compensatedDot(vector, column);
			parts[k] = (parts[k] ?? 0) + part;
			for (let i = 0; i < vector.length; i++) vector[i] = (vector[i] ?? 0) - part * (column[i] ?? 0);
		}
	}
	return parts;
}

export function lengthOf(vector: Float64Array): number {
	return Math.sqrt(compensatedDot(vector, vector));
}

function refuseConstant(name: string, values: Float64Array, spread: number): void {
	if (spread > CONSTANT_SHARE * lengthOf(values)) return;
	throw new InputError(
		'constant-predictor',
		`“${name}” is ${values[0] ?? 0} for every pair of these species, so nothing can be allowed for. Leave it out of the plan.`,
		{ name }
	);
}

/** Which of the predictors before it says the same, or that only all of them together do. */
function collinear(predictors: readonly Predictor[], centred: readonly Float64Array[], k: number): InputError {
	const name = predictors[k]?.name ?? '';
	const last = centred[k] ?? new Float64Array(0);
	const twin = centred.slice(0, k).findIndex((column) => {
		const correlation = compensatedDot(column, last) / (lengthOf(column) * lengthOf(last));
		return 1 - correlation * correlation <= OWN_SHARE;
	});
	const other = predictors[twin]?.name;
	const message =
		other === undefined
			? `“${name}” is a linear function of the predictors before it (${predictors
					.slice(0, k)
					.map((predictor) => `“${predictor.name}”`)
					.join(', ')}): none of their effects can be told apart. Leave one out of the plan.`
			: `“${name}” is a linear function of “${other}”: their effects cannot be told apart. Leave the covariate out of the plan.`;
	return new InputError('collinear', message, other === undefined ? { name } : { name, otherName: other });
}
