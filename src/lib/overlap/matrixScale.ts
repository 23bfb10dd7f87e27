import { remark, type Remark } from '#lib/remarks/remark.ts';
import type { MatrixEntries } from './matrixEntries.ts';
import { ROUNDING, type MatrixKind, type MatrixOptions, type MatrixScale } from './matrixReading.ts';

export type Judged<T> = { readonly value: T; readonly remarks: readonly Remark[] };

/** Values on the diagonal and off it, as they arrived. */
export type Split = { readonly diagonal: readonly number[]; readonly pairs: readonly number[] };

export function splitDiagonal({ from, to, value }: MatrixEntries): Split {
	const diagonal: number[] = [];
	const pairs: number[] = [];
	for (const [k, number] of value.entries()) (from[k] === to[k] ? diagonal : pairs).push(number);
	return { diagonal, pairs };
}

/** Whether the values are fractions of 1 or per cent; asks until `confirm.scale` is given. */
export function judgeScale(split: Split, options: MatrixOptions): Judged<MatrixScale> {
	const confirmed = options.confirm?.scale;
	if (confirmed !== undefined) return { value: confirmed, remarks: [] };
	if (!readsAsPercent(split, options.measure)) return { value: 'fraction', remarks: [] };
	const largest = split.pairs.reduce((most, value) => Math.max(most, value), 0);
	const message = `Values go up to ${largest}, so the matrix reads as per cent; every value will be divided by 100. Confirm the scale: percent or fraction.`;
	return { value: 'percent', remarks: [remark('settle', 'percent-or-fraction', message)] };
}

/** One stray 1.3 among fractions is an error, not a percentage: at least half of the values above 0 must exceed 1. */
function readsAsPercent({ diagonal, pairs }: Split, measure: string): boolean {
	let [above, positive, outside] = [0, 0, 0];
	for (const value of pairs) {
		if (value > 0) positive += 1;
		if (value > 1 + ROUNDING) above += 1;
		if (value < 0 || value > 100 + ROUNDING) outside += 1;
	}
	if (isAll(diagonal, 100)) return true;
	if (above === 0 || outside > 0 || isAll(diagonal, 1)) return false;
	const correlationDistance = measure === 'spearman-cells' && isAll(diagonal, 0) && pairs.every((value) => value <= 2 + ROUNDING);
	return !correlationDistance && above * 2 >= positive;
}

/** Closeness to 1 or 0 below which a diagonal counts as exact; matrices are printed with six digits or more. */
const DIAGONAL_TOLERANCE = 1e-6;

/** Whether there are values and all are `target`. */
export function isAll(values: readonly number[], target: number): boolean {
	return values.length > 0 && values.every((value) => isAt(value, target));
}

export function isAt(value: number, target: number): boolean {
	return Math.abs(value - target) <= DIAGONAL_TOLERANCE * Math.max(1, target);
}

/** What a header word says of the values. */
export function kindOfHeader(header: string): MatrixKind | undefined {
	if (/distance|dissimilarity/.test(header)) return 'distance';
	return /overlap|similarity/.test(header) ? 'similarity' : undefined;
}
