import { remark, type Remark } from '#lib/remarks/remark.ts';
import type { MatrixEntries } from './matrixEntries.ts';
import { ROUNDING, type MatrixKind, type MatrixOptions, type MatrixScale } from './matrixReading.ts';

export type Judged<T> = { readonly value: T; readonly remarks: readonly Remark[] };

/** The values on the diagonal, and what decides the scale of those off it, as they arrived. */
export type Split = {
	readonly diagonal: readonly number[];
	readonly pairs: PairCounts;
};
type PairCounts = {
	count: number;
	largest: number;
	positive: number;
	aboveOne: number;
	aboveTwo: number;
	outsidePercent: number;
};

export function splitDiagonal({ from, to, value }: MatrixEntries): Split {
	const diagonal: number[] = [];
	const pairs: PairCounts = { count: 0, largest: 0, positive: 0, aboveOne: 0, aboveTwo: 0, outsidePercent: 0 };
	for (let k = 0; k < value.length; k++) {
		if (from[k] === to[k]) diagonal.push(value[k] ?? 0);
		else countPair(pairs, value[k] ?? 0);
	}
	return { diagonal, pairs };
}

function countPair(pairs: PairCounts, value: number): void {
	pairs.count += 1;
	if (value > pairs.largest) pairs.largest = value;
	if (value > 0) pairs.positive += 1;
	if (value > 1 + ROUNDING) pairs.aboveOne += 1;
	if (value > 2 + ROUNDING) pairs.aboveTwo += 1;
	if (value < 0 || value > 100 + ROUNDING) pairs.outsidePercent += 1;
}

/** Whether the values are fractions of 1 or per cent; asks until `confirm.scale` is given. */
export function judgeScale(split: Split, options: MatrixOptions): Judged<MatrixScale> {
	const confirmed = options.confirm?.scale;
	if (confirmed !== undefined) return { value: confirmed, remarks: [] };
	if (!readsAsPercent(split, options.measure)) return { value: 'fraction', remarks: [] };
	const message = `Values go up to ${split.pairs.largest}, so the matrix reads as per cent; every value will be divided by 100. Confirm the scale: percent or fraction.`;
	return { value: 'percent', remarks: [remark('settle', 'percent-or-fraction', message)] };
}

/** One stray 1.3 among fractions is an error, not a percentage: at least half of the values above 0 must exceed 1. */
function readsAsPercent({ diagonal, pairs }: Split, measure: string): boolean {
	if (isAll(diagonal, 100)) return true;
	if (pairs.aboveOne === 0 || pairs.outsidePercent > 0 || isAll(diagonal, 1)) return false;
	const correlationDistance = measure === 'spearman-cells' && isAll(diagonal, 0) && pairs.aboveTwo === 0;
	return !correlationDistance && pairs.aboveOne * 2 >= pairs.positive;
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
