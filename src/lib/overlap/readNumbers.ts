import { InputError } from '#lib/remarks/inputError.ts';
import { cellNumber, decimalOf } from './cellNumber.ts';
import { entryPlace, entryText, type MatrixEntries, type TextEntries } from './matrixEntries.ts';
import type { Decimal } from './matrixReading.ts';

/**
 * The cells as numbers, with the decimal sign most of them use.
 * @throws {InputError} `not-a-number` with the first offending cell and how many there are
 */
export function readNumbers(entries: TextEntries): { entries: MatrixEntries; decimal: Decimal } {
	const { separator } = entries.source.table;
	const value = new Float64Array(entries.source.cells.length);
	const decimal = separator === ',' ? '.' : decimalOf(value.length, (k) => entryText(entries, k));
	for (let k = 0; k < value.length; k++) value[k] = cellNumber(entryText(entries, k), decimal);
	const first = value.findIndex((number) => !Number.isFinite(number));
	if (first !== -1) {
		const count = value.reduce((sum, number) => sum + (Number.isFinite(number) ? 0 : 1), 0);
		const { said, where } = entryPlace(entries, first);
		const text = entryText(entries, first);
		const others = count === 1 ? '' : ` It is the first of ${count} such cells.`;
		throw new InputError('not-a-number', `${said}: “${text}” is not a number.${numberHint(text, separator)}${others}`, where);
	}
	const { species, from, to, source } = entries;
	return { entries: { species, from, to, source, value }, decimal };
}

function numberHint(text: string, separator: TextEntries['source']['table']['separator']): string {
	if (/^[+-]?\d*,\d+$/.test(text)) {
		return separator === ','
			? ' With decimal commas, separate the cells by semicolons or tabs.'
			: ' Other cells have decimal points: use one decimal sign throughout.';
	}
	if (/^[+-]?\d*\.\d+$/.test(text)) return ' Other cells have decimal commas: use one decimal sign throughout.';
	if (/%$/.test(text)) return ' Write percentages without the sign.';
	return ' Leave a missing value blank or write NA.';
}
