import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { alignNames, type NameAlignment } from './alignNames.ts';
import { isMissing, isWord } from './cellNumber.ts';
import { cellAt, cellPlace, cellText, rowCount, rowLength, type CellTable } from './cellTable.ts';
import { listNames } from './listNames.ts';
import { refuseRepeats, refuseTooMany, type TextEntries } from './matrixEntries.ts';
import { plainName } from './plainName.ts';
import { squareHeader, type SquareHeader } from './squareHeader.ts';

export type SquareLayout = { readonly entries: TextEntries; readonly remarks: readonly Remark[] };

/**
 * The cells of a square or half table, each given to its two species by name, so rows and columns may be ordered
 * differently.
 *
 * @throws {InputError} `not-a-number` for a table of words, `duplicate-species`, `unnamed-species`, `names-differ`,
 * `ragged-rows`, `too-many-species`
 */
export function squareEntries(table: CellTable): SquareLayout {
	refuseTooMany(rowCount(table) - 1);
	const header = squareHeader(table);
	refuseWords(header);
	const rowNames = header.rowNames.map(plainName);
	const columnNames = (header.columnNames ?? header.rowNames).map(plainName);
	refuseTooMany(Math.max(rowNames.length, columnNames.length));
	if (!header.namedByHeader) refuseRepeats(rowNames, (index) => `line ${table.lines[header.bodyStart + index] ?? 0}`);
	refuseRepeats(columnNames, (index) => `column ${index + 1 + header.firstNamed}`);

	refuseRagged(header, columnNames);
	const alignment = alignNames(rowNames, columnNames);
	const entries = collectCells(header, alignment);
	refuseStrangers(alignment, entries);
	return { entries, remarks: layoutRemarks(header, alignment) };
}

function collectCells({ table, bodyStart, skip }: SquareHeader, alignment: NameAlignment): TextEntries {
	// Typed arrays of the largest size: four million cells pushed one by one take seconds.
	const most = table.starts.length;
	const [from, to, cells] = [new Int32Array(most), new Int32Array(most), new Int32Array(most)];
	let count = 0;
	for (let row = bodyStart; row < rowCount(table); row++) {
		const first = table.firstCells[row] ?? 0;
		for (let cell = skip; cell < rowLength(table, row); cell++) {
			if (isMissing(cellText(table, first + cell))) continue;
			from[count] = alignment.rowSpecies[row - bodyStart] ?? -1;
			to[count] = alignment.columnSpecies[cell - skip] ?? -1;
			cells[count] = first + cell;
			count += 1;
		}
	}
	return { species: alignment.species, from, to, source: { table, cells: cells.subarray(0, count) } };
}

/** A table of words is a trait table or another sheet: say so instead of naming one cell of many. */
function refuseWords({ table, bodyStart, skip }: SquareHeader): void {
	let first = -1;
	let words = 0;
	let numbers = 0;
	for (let row = bodyStart; row < rowCount(table); row++) {
		const start = table.firstCells[row] ?? 0;
		for (let cell = skip; cell < rowLength(table, row); cell++) {
			const text = cellText(table, start + cell);
			if (isMissing(text)) continue;
			if (!isWord(text)) numbers += 1;
			else {
				words += 1;
				if (first === -1) first = start + cell;
			}
		}
	}
	if (first === -1 || words <= numbers) return;
	const { line, column } = cellPlace(table, first);
	const count = numbers === 0 ? 'no cell is one' : `${words} of ${words + numbers} cells are words`;
	const message = `Expected numbers between species; ${count} (the first, line ${line}, column ${column}, reads “${cellText(table, first)}”). Is this a table of traits? Bring the overlaps.`;
	throw new InputError('not-a-number', message, { line, column });
}

/** Rows are as long as the header. Only a lower half, with nothing beyond its diagonal, may end its rows early. */
function refuseRagged(
	{ table, bodyStart, skip, rowNames, columnNames: header }: SquareHeader,
	columnNames: readonly string[]
): void {
	const position = new Map(columnNames.map((name, index) => [name, index]));
	const width = columnNames.length;
	const diagonals = rowNames.map((name) => position.get(plainName(name)) ?? width);
	const isBlankFrom = (row: number, start: number) => {
		for (let cell = start; cell < rowLength(table, row); cell++) if (!isMissing(cellAt(table, row, cell))) return false;
		return true;
	};
	const isLower = diagonals.every((diagonal, i) => isBlankFrom(bodyStart + i, skip + diagonal + 1));
	for (let row = bodyStart; row < rowCount(table); row++) {
		const [line, got] = [table.lines[row] ?? 0, rowLength(table, row) - skip];
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
	const { cells } = entries.source;
	const half = onlyRows.length <= 1 && onlyColumns.length <= 1 && cells.length <= (species.length * (species.length - 1)) / 2;
	if (half && cells.every((_, k) => entries.from[k] !== entries.to[k])) return;
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
