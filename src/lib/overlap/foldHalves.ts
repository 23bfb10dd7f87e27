import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { entryPlace, type MatrixEntries } from './matrixEntries.ts';
import type { MatrixShape, MatrixTriangle } from './matrixReading.ts';

/** The two halves may differ by this much from rounding alone; unit of the overlap. */
const ASYMMETRY_TOLERANCE = 1e-6;

export type FoldOptions = {
	readonly isPairList: boolean;
	readonly triangle?: MatrixTriangle | undefined;
	/** value of a full overlap */ readonly full: number;
};
export type Folded = { readonly values: Float64Array; readonly shape: MatrixShape; readonly remarks: readonly Remark[] };

/**
 * Brings both halves of a matrix together: one symmetric matrix of the values as they arrived, NaN where missing,
 * diagonal NaN. Differing halves are averaged and asked about, unless `triangle` says what to take. A half that holds
 * only zeros while the other does not is taken as not filled in.
 *
 * @throws {InputError} `pair-twice` when one cell or list row is given twice with different values
 */
export function foldHalves(entries: MatrixEntries, options: FoldOptions): Folded {
	const n = entries.species.length;
	const raw = spread(entries, ASYMMETRY_TOLERANCE * options.full);
	const halves = survey(raw, n);
	const zeroHalf = options.isPairList ? undefined : zeroFilledHalf(halves);
	const remarks: Remark[] = [];
	let triangle = options.triangle ?? 'average';
	if (zeroHalf !== undefined && options.triangle === undefined) {
		triangle = zeroHalf === 'upper' ? 'lower' : 'upper';
		remarks.push(zeroFilledRemark(zeroHalf));
	}
	const worst = foldInPlace(raw, n, triangle);
	if (remarks.length === 0 && options.triangle === undefined && worst.gap > ASYMMETRY_TOLERANCE * options.full) {
		remarks.push(asymmetryRemark(entries.species, worst));
	}
	return { values: raw, shape: shapeOf(halves, zeroHalf, options.isPairList), remarks };
}

function spread(entries: MatrixEntries, tolerance: number): Float64Array {
	const { species, from, to, value } = entries;
	const raw = new Float64Array(species.length ** 2).fill(Number.NaN);
	for (let k = 0; k < value.length; k++) {
		const number = value[k] ?? Number.NaN;
		const at = (from[k] ?? 0) * species.length + (to[k] ?? 0);
		const before = raw[at] ?? Number.NaN;
		if (Math.abs(before - number) > tolerance) {
			const { said, where } = entryPlace(entries, k);
			const pair = `“${species[from[k] ?? 0] ?? ''}” and “${species[to[k] ?? 0] ?? ''}”`;
			throw new InputError(
				'pair-twice',
				`${said}: expected each pair once; ${pair} had ${before} before and have ${number} here.`,
				where
			);
		}
		raw[at] = number;
	}
	return raw;
}

type Half = { given: number; nonZero: number };
type Halves = { readonly upper: Half; readonly lower: Half };

function survey(raw: Float64Array, n: number): Halves {
	const halves = { upper: { given: 0, nonZero: 0 }, lower: { given: 0, nonZero: 0 } };
	for (let i = 0; i < n; i++) {
		for (let j = 0; j < n; j++) {
			const value = raw[i * n + j] ?? Number.NaN;
			if (i === j || Number.isNaN(value)) continue;
			const half = i < j ? halves.upper : halves.lower;
			half.given += 1;
			if (value !== 0) half.nonZero += 1;
		}
	}
	return halves;
}

function zeroFilledHalf({ upper, lower }: Halves): 'upper' | 'lower' | undefined {
	if (upper.given === 0 || lower.given === 0) return undefined;
	if (upper.nonZero === 0 && lower.nonZero > 0) return 'upper';
	return lower.nonZero === 0 && upper.nonZero > 0 ? 'lower' : undefined;
}

function shapeOf({ upper, lower }: Halves, zeroHalf: 'upper' | 'lower' | undefined, isPairList: boolean): MatrixShape {
	if (isPairList) return 'pairs';
	if (upper.given === 0 || zeroHalf === 'upper') return 'lower';
	return lower.given === 0 || zeroHalf === 'lower' ? 'upper' : 'square';
}

type Worst = { readonly i: number; readonly j: number; readonly upper: number; readonly lower: number; readonly gap: number };

/** Puts the value of each pair in both places, NaN on the diagonal; returns the pair whose halves differed most. */
function foldInPlace(values: Float64Array, n: number, triangle: MatrixTriangle): Worst {
	let worst: Worst = { i: 0, j: 0, upper: 0, lower: 0, gap: 0 };
	for (let i = 0; i < n; i++) {
		values[i * n + i] = Number.NaN;
		for (let j = i + 1; j < n; j++) {
			const upper = values[i * n + j] ?? Number.NaN;
			const lower = values[j * n + i] ?? Number.NaN;
			const gap = Math.abs(upper - lower);
			if (gap > worst.gap) worst = { i, j, upper, lower, gap };
			const value = joined(upper, lower, triangle);
			values[i * n + j] = value;
			values[j * n + i] = value;
		}
	}
	return worst;
}

/** A pair given on one side only has that value, whichever half was asked for. */
function joined(upper: number, lower: number, triangle: MatrixTriangle): number {
	if (Number.isNaN(upper)) return lower;
	if (Number.isNaN(lower) || upper === lower) return upper;
	if (triangle === 'average') return (upper + lower) / 2;
	return triangle === 'upper' ? upper : lower;
}

function zeroFilledRemark(half: 'upper' | 'lower'): Remark {
	const [side, other] = half === 'upper' ? ['above', 'lower'] : ['below', 'upper'];
	const message = `Every cell ${side} the diagonal is 0 and the ${other} half is not, so zeros were taken as not filled in and the ${other} half is used. Confirm the triangle: ${other}, or average if the zeros are meant.`;
	return remark('settle', 'zero-filled-half', message);
}

function asymmetryRemark(species: readonly string[], { i, j, upper, lower }: Worst): Remark {
	const [name = '', otherName = ''] = [species[i], species[j]];
	const values = `${upper} one way and ${lower} the other`;
	const message = `The two halves differ, most for “${name}” and “${otherName}”: ${values}. Their average is used. Confirm the triangle: average, upper or lower.`;
	return remark('settle', 'asymmetric', message, { name, otherName });
}
