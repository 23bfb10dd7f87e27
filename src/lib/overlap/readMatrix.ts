import { InputError } from '#lib/remarks/inputError.ts';
import { refuseRepeats, refuseTooMany, type MatrixEntries } from './matrixEntries.ts';
import type { MatrixOptions, MatrixReading } from './matrixReading.ts';
import { isPairList, pairEntries } from './pairLayout.ts';
import { readCells } from './readCells.ts';
import { readNumbers } from './readNumbers.ts';
import { readText } from './readText.ts';
import { settleMatrix, type Layout } from './settleMatrix.ts';
import { squareEntries } from './squareLayout.ts';

/**
 * Reads a species-by-species matrix from text: a full square, one half with or without its diagonal, or a list of pairs;
 * cells separated by commas, semicolons or tabs; decimal points, or decimal commas where commas do not separate cells.
 *
 * Whatever can be read is delivered as similarities with the best guess applied; each guess that changes values is a
 * `settle` remark until `options.confirm` answers it. Rows and columns are matched by name, never by position, when
 * both are named.
 *
 * @param source - the text, or the bytes of a file in UTF-8, UTF-16 or Windows-1252
 * @param options - the measure and what a person has confirmed
 * @throws {InputError} when the text is no matrix; codes in the files that check: `readText`, `readCells`,
 * `squareLayout`, `pairLayout`, `readNumbers`, `settleMatrix`
 */
export function readMatrix(source: string | Uint8Array, options: MatrixOptions): MatrixReading {
	const { entries, layout, ...told } = matrixEntries(source);
	const settled = settleMatrix(entries, layout, options);
	return { ...settled, separator: told.separator, decimal: told.decimal, remarks: [...told.remarks, ...settled.remarks] };
}

export type EnteredMatrix = Pick<MatrixReading, 'separator' | 'decimal' | 'remarks'> & {
	readonly entries: MatrixEntries;
	readonly layout: Layout;
};

/** The numbers of a species-by-species table by their two species, as they arrived: nothing about them judged yet. */
export function matrixEntries(source: string | Uint8Array): EnteredMatrix {
	const decoded = readText(source);
	const table = readCells(decoded.text);
	const isList = isPairList(table);
	const layout = isList ? pairEntries(table) : { ...squareEntries(table), valueHeader: '' };
	const { entries, decimal } = readNumbers(layout.entries);
	return {
		entries,
		layout: { isPairList: isList, valueHeader: layout.valueHeader },
		separator: table.separator,
		decimal,
		remarks: [...decoded.remarks, ...layout.remarks]
	};
}

/** A matrix as a program sends it: one row of values for each species, in the same order; null is missing. */
export type MatrixBody = { readonly species: readonly string[]; readonly values: readonly (readonly (number | null)[])[] };

/**
 * The same reading and the same checks as `readMatrix`, for a matrix that comes as numbers.
 *
 * @throws {InputError} `ragged-rows` unless `values` is square, `not-a-number` on infinity or NaN, `duplicate-species`,
 * `unnamed-species`, `too-many-species`, and all of `settleMatrix`
 */
export function matrixFromBody(body: MatrixBody, options: MatrixOptions): MatrixReading {
	const settled = settleMatrix(bodyEntries(body), { isPairList: false, valueHeader: '' }, options);
	return { ...settled, separator: null, decimal: null };
}

/** The same as `matrixEntries` for a matrix that comes as numbers. */
export function bodyEntries({ species, values }: MatrixBody): MatrixEntries {
	refuseTooMany(species.length);
	const names = species.map((name) => name.trim());
	refuseRepeats(names, (index) => `position ${index + 1} of the species`);
	refuseUnsquare(names, values);
	return collectBody(names, values);
}

function refuseUnsquare(names: readonly string[], values: MatrixBody['values']): void {
	const n = names.length;
	if (values.length !== n) {
		throw new InputError('ragged-rows', `Expected ${n} rows of values, one for each species; got ${values.length}.`);
	}
	for (const [i, row] of values.entries()) {
		const name = names[i] ?? '';
		if (row.length !== n)
			throw new InputError('ragged-rows', `Row “${name}”: expected ${n} values; got ${row.length}.`, { name });
	}
}

function collectBody(species: readonly string[], values: MatrixBody['values']): MatrixEntries {
	const most = species.length ** 2;
	const [from, to, kept] = [new Int32Array(most), new Int32Array(most), new Float64Array(most)];
	let count = 0;
	for (const [i, row] of values.entries()) {
		for (const [j, value] of row.entries()) {
			if (value === null) continue;
			if (!Number.isFinite(value)) {
				const [name = '', otherName = ''] = [species[i], species[j]];
				const message = `Row “${name}”, column “${otherName}”: ${value} is not a number. Send null for a missing value.`;
				throw new InputError('not-a-number', message, { name, otherName });
			}
			from[count] = i;
			to[count] = j;
			kept[count] = value;
			count += 1;
		}
	}
	return { species, from, to, source: null, value: kept.subarray(0, count) };
}
