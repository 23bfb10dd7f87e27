import type { Remark } from '#lib/remarks/remark.ts';
import type { PairMatrix } from './pairMatrix.ts';

export type MatrixKind = 'similarity' | 'distance';
export type MatrixScale = 'fraction' | 'percent';
export type MatrixTriangle = 'average' | 'upper' | 'lower';
export type MatrixShape = 'square' | 'lower' | 'upper' | 'pairs';
export type Separator = ',' | ';' | '\t';
export type Decimal = '.' | ',';

/** What a person has settled beforehand; each answer closes the remark that would ask for it. */
export type MatrixConfirm = {
	readonly kind?: MatrixKind | undefined;
	readonly scale?: MatrixScale | undefined;
	readonly triangle?: MatrixTriangle | undefined;
};

export type MatrixOptions = {
	/** the measure the values are said to be; `spearman-cells` may be negative */
	readonly measure: string;
	readonly confirm?: MatrixConfirm | undefined;
};

/** A matrix as read, with the best guess applied and every guess told in `remarks`. */
export type MatrixReading = {
	/** similarities, 1 on the diagonal, NaN where a pair is missing */
	readonly matrix: PairMatrix;
	readonly shape: MatrixShape;
	readonly kind: MatrixKind;
	readonly scale: MatrixScale;
	/** null when the matrix did not come as text */
	readonly decimal: Decimal | null;
	readonly separator: Separator | null;
	readonly remarks: readonly Remark[];
};

/** Largest matrix taken, in species. */
export const SPECIES_LIMIT = 2000;

/** An overlap may leave 0 to 1 by this much and no more: rounding of sums of floating-point shares. Dimensionless. */
export const ROUNDING = 1e-12;
