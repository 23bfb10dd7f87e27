import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { foldHalves } from './foldHalves.ts';
import { refuseTooFew, type MatrixEntries } from './matrixEntries.ts';
import { judgeKind } from './matrixKind.ts';
import { checkRange } from './matrixRange.ts';
import { ROUNDING, type MatrixKind, type MatrixOptions, type MatrixReading } from './matrixReading.ts';
import { judgeScale, splitDiagonal } from './matrixScale.ts';
import { pairValue, type PairMatrix } from './pairMatrix.ts';

export type Layout = { readonly isPairList: boolean; readonly valueHeader: string };

/**
 * From cells as they arrived to a matrix of similarities: scale, kind, range and symmetry judged in this order, what is
 * doubtful told in remarks.
 *
 * @throws {InputError} `too-few-species`, `empty`, `mixed-diagonal`, `out-of-range`, `pair-twice`
 */
export function settleMatrix(
	entries: MatrixEntries,
	layout: Layout,
	options: MatrixOptions
): Omit<MatrixReading, 'separator' | 'decimal'> {
	refuseTooFew(entries.species);
	const split = splitDiagonal(entries);
	if (split.pairs.count === 0)
		throw new InputError('empty', 'Expected a value for at least one pair of species; every pair is missing.');
	const scale = judgeScale(split, options);
	const full = scale.value === 'percent' ? 100 : 1;
	const kind = judgeKind(entries, { split, full, header: layout.valueHeader }, options);
	const rangeRemarks = checkRange(entries, { kind: kind.value, full }, options);
	const folded = foldHalves(entries, { isPairList: layout.isPairList, triangle: options.confirm?.triangle, full });
	const matrix = similaritiesInPlace(entries.species, folded.values, { kind: kind.value, full });
	const remarks = [...scale.remarks, ...kind.remarks, ...rangeRemarks, ...folded.remarks, ...pairRemarks(matrix)];
	return { matrix, shape: folded.shape, kind: kind.value, scale: scale.value, remarks };
}

function similaritiesInPlace(
	species: readonly string[],
	values: Float64Array,
	frame: { kind: MatrixKind; full: number }
): PairMatrix {
	for (let at = 0; at < values.length; at++) {
		const share = (values[at] ?? Number.NaN) / frame.full;
		values[at] = withoutRounding(frame.kind === 'distance' ? 1 - share : share);
	}
	for (let i = 0; i < species.length; i++) values[i * species.length + i] = 1;
	return { species, values };
}

function withoutRounding(value: number): number {
	if (value > 1) return 1;
	return value < 0 && value >= -ROUNDING ? 0 : value;
}

function pairRemarks(matrix: PairMatrix): Remark[] {
	const { species } = matrix;
	const missing: string[] = [];
	let [least, most, count, missingCount] = [Infinity, -Infinity, 0, 0];
	for (const [i, name] of species.entries()) {
		for (let j = i + 1; j < species.length; j++) {
			const value = pairValue(matrix, i, j);
			if (Number.isNaN(value)) {
				missingCount += 1;
				if (missing.length < 3) missing.push(`“${name}” with “${species[j] ?? ''}”`);
				continue;
			}
			count += 1;
			least = Math.min(least, value);
			most = Math.max(most, value);
		}
	}
	const remarks: Remark[] = missingCount === 0 ? [] : [missingRemark(missing, missingCount)];
	if (species.length === 2) {
		remarks.push(
			remark('settle', 'single-pair', 'Two species make a single pair; nothing can be tested. Bring at least four species.')
		);
	} else if (most - least <= ROUNDING) {
		const message = `All ${count} pairs have the same overlap, ${least}; nothing can fall or rise with age. Bring a matrix whose values differ.`;
		remarks.push(remark('settle', 'constant-overlap', message));
	}
	return remarks;
}

function missingRemark(first: readonly string[], count: number): Remark {
	const [verb, pairs] = count === 1 ? ['is', 'pair'] : ['are', 'pairs'];
	const more = count > first.length ? ` and ${(count - first.length).toLocaleString('en')} more` : '';
	const message = `${count.toLocaleString('en')} ${pairs} ${verb} missing: ${first.join(', ')}${more}. A test needs every pair: leave species out or fill them in.`;
	return remark('look', 'missing-pairs', message);
}
