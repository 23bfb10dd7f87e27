import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { foldHalves } from './foldHalves.ts';
import { entryPlace, refuseTooFew, type MatrixEntries } from './matrixEntries.ts';
import type { Decimal, MatrixKind, MatrixShape, MatrixTriangle, Separator } from './matrixReading.ts';
import { isAll, kindOfHeader, splitDiagonal } from './matrixScale.ts';
import { pairValue, type PairMatrix } from './pairMatrix.ts';
import { bodyEntries, matrixEntries, type EnteredMatrix, type MatrixBody } from './readMatrix.ts';

export type CovariateConfirm = { readonly kind?: MatrixKind | undefined; readonly triangle?: MatrixTriangle | undefined };

/** A covariate as read: values as they stand, on whatever scale they have. */
export type CovariateMatrix = {
	/** NaN on the diagonal and where a pair is missing */
	readonly matrix: PairMatrix;
	readonly kind: MatrixKind;
	readonly shape: MatrixShape;
	/** null when it did not come as text */
	readonly separator: Separator | null;
	readonly decimal: Decimal | null;
	readonly remarks: readonly Remark[];
};

/**
 * Reads a species-by-species matrix of any non-negative quantity, such as kilometres, in the layouts of `readMatrix`. The
 * values stay as they are: whether they are distances or similarities matters to words only, so it is noticed and not asked.
 *
 * @throws {InputError} as `readMatrix` where the text is no matrix; `negative-value`, `too-few-species`, `empty`, `pair-twice`
 */
export function readCovariate(source: string | Uint8Array, confirm: CovariateConfirm = {}): CovariateMatrix {
	return settleCovariate(matrixEntries(source), confirm);
}

/** The same for a matrix that comes as numbers. */
export function covariateFromBody(body: MatrixBody, confirm: CovariateConfirm = {}): CovariateMatrix {
	const layout = { isPairList: false, valueHeader: '' };
	return settleCovariate({ entries: bodyEntries(body), layout, separator: null, decimal: null, remarks: [] }, confirm);
}

function settleCovariate({ entries, layout, ...told }: EnteredMatrix, { kind, triangle }: CovariateConfirm): CovariateMatrix {
	refuseTooFew(entries.species);
	refuseNegative(entries);
	const { diagonal, pairs } = splitDiagonal(entries);
	if (pairs.count === 0)
		throw new InputError('empty', 'Expected a value for at least one pair of species; every pair is missing.');
	const folded = foldHalves(entries, { isPairList: layout.isPairList, triangle, full: pairs.largest });
	const matrix = { species: entries.species, values: folded.values };
	return {
		matrix,
		kind: kind ?? kindOf(diagonal, layout.valueHeader),
		shape: folded.shape,
		separator: told.separator,
		decimal: told.decimal,
		remarks: [...told.remarks, ...folded.remarks, ...pairRemarks(matrix)]
	};
}

/** A species is at distance 0 from itself; any other diagonal, as of range sizes, goes with similarities. */
function kindOf(diagonal: readonly number[], header: string): MatrixKind {
	if (diagonal.length === 0) return kindOfHeader(header) ?? 'distance';
	return isAll(diagonal, 0) ? 'distance' : 'similarity';
}

function refuseNegative(entries: MatrixEntries): void {
	const isWrong = (value: number, k: number) => value < 0 && entries.from[k] !== entries.to[k];
	const first = entries.value.findIndex(isWrong);
	if (first === -1) return;
	const count = entries.value.reduce((sum, value, k) => sum + (isWrong(value, k) ? 1 : 0), 0);
	const { said, where } = entryPlace(entries, first);
	const others = count === 1 ? '' : ` It is the first of ${count} such cells.`;
	const message = `${said}: expected a covariate of 0 or more; got ${entries.value[first] ?? 0}.${others} Add a constant to all pairs first: it changes no result.`;
	throw new InputError('negative-value', message, where);
}

function pairRemarks(matrix: PairMatrix): Remark[] {
	const { species } = matrix;
	const missing: string[] = [];
	let [least, most, missingCount] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0];
	for (const [i, name] of species.entries()) {
		for (let j = i + 1; j < species.length; j++) {
			const value = pairValue(matrix, i, j);
			if (Number.isNaN(value)) {
				missingCount += 1;
				if (missing.length < 3) missing.push(`“${name}” with “${species[j] ?? ''}”`);
				continue;
			}
			least = Math.min(least, value);
			most = Math.max(most, value);
		}
	}
	const remarks: Remark[] = missingCount === 0 ? [] : [missingRemark(missing, missingCount)];
	if (least === most) remarks.push(constantRemark(least));
	return remarks;
}

function missingRemark(first: readonly string[], count: number): Remark {
	const [verb, pairs] = count === 1 ? ['is', 'pair'] : ['are', 'pairs'];
	const more = count > first.length ? ` and ${(count - first.length).toLocaleString('en')} more` : '';
	const message = `${count.toLocaleString('en')} ${pairs} ${verb} missing: ${first.join(', ')}${more}. A test needs every pair: leave species out or fill them in.`;
	return remark('look', 'missing-pairs', message);
}

function constantRemark(value: number): Remark {
	const message = `Every pair has the value ${value}, so there is nothing to allow for. Bring a matrix whose values differ.`;
	return remark('settle', 'constant-covariate', message);
}
