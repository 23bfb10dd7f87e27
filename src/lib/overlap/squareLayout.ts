import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { alignNames, type NameAlignment } from './alignNames.ts';
import { isMissing, isWord } from './cellNumber.ts';
import { listNames } from './listNames.ts';
import { refuseRepeats, refuseTooMany, type TextEntries } from './matrixEntries.ts';
import { plainName } from './plainName.ts';
import type { CellRow } from './readCells.ts';
import { squareHeader, type SquareHeader } from './squareHeader.ts';

export type SquareLayout = { readonly entries: TextEntries; readonly remarks: readonly Remark[] };

/**
 * The cells of a square or half table, each given to its two species by name, so rows and columns may be ordered
 * differently.
 *
 * @throws {InputError} `not-a-number` for a table of words, `duplicate-species`, `unnamed-species`, `names-differ`,
 * `ragged-rows`, `too-many-species`
 */
export function squareEntries(rows: readonly CellRow[]): SquareLayout {
	refuseTooMany(rows.length - 1);
	const header = squareHeader(rows);
	refuseWords(header);
	const rowNames = header.rowNames.map(plainName);
	const columnNames = (header.columnNames ?? header.rowNames).map(plainName);
	refuseTooMany(Math.max(rowNames.length, columnNames.length));
	if (!header.namedByHeader) refuseRepeats(rowNames, (index) => `line ${header.body[index]?.line ?? 0}`);
	refuseRepeats(columnNames, (index) => `column ${index + 1 + header.firstNamed}`);

	refuseRagged(header, columnNames);
	const alignment = alignNames(rowNames, columnNames);
	const entries = collectCells(header, alignment);
	refuseStrangers(alignment, entries);
	return { entries, remarks: layoutRemarks(header, alignment) };
}

function collectCells({ body, skip }: SquareHeader, alignment: NameAlignment): TextEntries {
	// Typed arrays of the largest size: four million cells pushed one by one take seconds.
	const most = body.reduce((sum, { cells }) => sum + cells.length, 0);
	const [from, to, line, column] = [new Int32Array(most), new Int32Array(most), new Int32Array(most), new Int32Array(most)];
	const text: string[] = [];
	for (const [i, row] of body.entries()) {
		for (let cell = skip; cell < row.cells.length; cell++) {
			const content = row.cells[cell] ?? '';
			if (isMissing(content)) continue;
			const k = text.push(content) - 1;
			from[k] = alignment.rowSpecies[i] ?? -1;
			to[k] = alignment.columnSpecies[cell - skip] ?? -1;
			line[k] = row.line;
			column[k] = cell + 1;
		}
	}
	return { species: alignment.species, from, to, line, column, text };
}

/** A table of words is a trait table or another sheet: say so instead of naming one cell of many. */
function refuseWords(header: SquareHeader): void {
	let first: { line: number; column: number; text: string } | undefined;
	let words = 0;
	let numbers = 0;
	for (const { line, cells } of header.body) {
		for (let cell = header.skip; cell < cells.length; cell++) {
			const text = cells[cell] ?? '';
			if (isMissing(text)) continue;
			if (!isWord(text)) numbers += 1;
			else {
				words += 1;
				first ??= { line, column: cell + 1, text };
			}
		}
	}
	if (first === undefined || words <= numbers) return;
	const { line, column, text } = first;
	const count = numbers === 0 ? 'no cell is one' : `${words} of ${words + numbers} cells are words`;
	const message = `Expected numbers between species; ${count} (the first, line ${line}, column ${column}, reads “${text}”). Is this a table of traits? Bring the overlaps.`;
	throw new InputError('not-a-number', message, { line, column });
}

/** Rows are as long as the header. Only a lower half, with nothing beyond its diagonal, may end its rows early. */
function refuseRagged({ body, skip, rowNames, columnNames: header }: SquareHeader, columnNames: readonly string[]): void {
	const position = new Map(columnNames.map((name, index) => [name, index]));
	const width = columnNames.length;
	const diagonals = rowNames.map((name) => position.get(plainName(name)) ?? width);
	const isLower = body.every(({ cells }, i) => cells.slice(skip + (diagonals[i] ?? width) + 1).every(isMissing));
	for (const { line, cells } of body) {
		const got = cells.length - skip;
		if (got === width || (isLower && got < width)) continue;
		const versus = header === undefined ? `there are ${width} rows` : `the header names ${width} species`;
		const hint = got > width ? ' If the numbers have decimal commas, separate the cells by semicolons or tabs.' : '';
		throw new InputError('ragged-rows', `Line ${line}: expected ${width} values, as ${versus}; got ${got}.${hint}`, { line });
	}
}

/**
 * A half without its diagonal leaves the first species out of the rows and the last out of the columns (or the other way
 * round). Any other difference between rows and columns is a mistake in a name.
 */
function refuseStrangers({ onlyRows, onlyColumns, species }: NameAlignment, entries: TextEntries): void {
	if (onlyRows.length + onlyColumns.length === 0) return;
	const half =
		onlyRows.length <= 1 && onlyColumns.length <= 1 && entries.text.length <= (species.length * (species.length - 1)) / 2;
	if (half && entries.text.every((_, k) => entries.from[k] !== entries.to[k])) return;
	if (onlyRows.length + onlyColumns.length === species.length) {
		const message = `Expected rows and columns to name the same species; they share none (rows ${listNames(onlyRows, 3)}; columns ${listNames(onlyColumns, 3)}). Is this a table of sites or traits? Bring the overlaps.`;
		throw new InputError('names-differ', message);
	}
	const told = [...onlyRows.map((name) => `“${name}” is only a row`), ...onlyColumns.map((name) => `“${name}” is only a column`)];
	const message = `Expected rows and columns to name the same species; ${told.join(', ')}. Correct the names or add what is missing.`;
	throw new InputError('names-differ', message, { name: onlyRows[0] ?? onlyColumns[0] ?? '' });
}

function layoutRemarks(header: SquareHeader, alignment: NameAlignment): Remark[] {
	const remarks: Remark[] = [];
	if (header.namedByHeader) {
		remarks.push(
			remark('look', 'names-from-header', 'Only the first row names the species; the rows were taken in the same order.')
		);
	}
	if (alignment.respelled > 0) {
		const message = `${alignment.respelled} columns spell their species differently from the rows (dots or underscores for blanks); the names of the rows are used.`;
		remarks.push(remark('information', 'names-aligned', message));
	}
	return remarks;
}
