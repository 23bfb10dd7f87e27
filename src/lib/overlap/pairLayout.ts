import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { isMissing, isWord } from './cellNumber.ts';
import { cellAt, rowCells, rowCount, type CellTable } from './cellTable.ts';
import { refuseTooMany, type TextEntries } from './matrixEntries.ts';
import { plainName } from './plainName.ts';

const FIRST_NAME_HEADER = /^(species|taxon|sp|name|tip)[\s_.-]?(a|1|i|x)$/i;
const VALUE_HEADERS = ['overlap', 'similarity', 'distance', 'dissimilarity', 'value', 'd', 'i'];

export type PairLayout = {
	readonly entries: TextEntries;
	/** the header of the column that was read, in lower case; '' without a header */
	readonly valueHeader: string;
	readonly remarks: readonly Remark[];
};

/** Whether the rows are a list of pairs: two names, then a value. A square has a value in its second cell. */
export function isPairList(table: CellTable): boolean {
	if (rowCount(table) === 0) return false;
	const first = rowCells(table, 0);
	if (FIRST_NAME_HEADER.test(first[0] ?? '')) return true;
	const bodyStart = rowCount(table) > 1 ? 1 : 0;
	const column = valueColumn(first);
	let [named, valued] = [0, 0];
	for (let row = bodyStart; row < rowCount(table); row++) {
		if (!isWord(cellAt(table, row, 0)) || !isWord(cellAt(table, row, 1))) continue;
		named += 1;
		if (!isWord(cellAt(table, row, column))) valued += 1;
	}
	return named * 2 > rowCount(table) - bodyStart && valued * 2 > named;
}

/**
 * The pairs of a list with two names and a value in each row. A pair that is not listed is missing.
 * @throws {InputError} `unnamed-species`, `too-many-species`
 */
export function pairEntries(table: CellTable): PairLayout {
	const first = rowCells(table, 0);
	const headed = rowCount(table) > 0 && hasHeader(first);
	const column = headed ? valueColumn(first) : 2;
	const valueHeader = headed ? (first[column] ?? '') : '';
	const remarks = table.width > 3 ? [otherColumns(column, valueHeader)] : [];
	return { entries: listEntries(table, headed ? 1 : 0, column), valueHeader: valueHeader.toLowerCase(), remarks };
}

function listEntries(table: CellTable, bodyStart: 0 | 1, column: number): TextEntries {
	const most = rowCount(table);
	const [from, to, cells] = [new Int32Array(most), new Int32Array(most), new Int32Array(most)];
	const index = new Map<string, number>();
	const species: string[] = [];
	const indexOf = (name: string): number => {
		const known = index.get(name);
		if (known !== undefined) return known;
		index.set(name, species.length);
		refuseTooMany(species.push(name));
		return species.length - 1;
	};
	let count = 0;
	for (let row = bodyStart; row < most; row++) {
		const name = nameAt(table, row, 0);
		const otherName = nameAt(table, row, 1);
		const [one, other] = [indexOf(name), indexOf(otherName)];
		if (isMissing(cellAt(table, row, column))) continue;
		from[count] = one;
		to[count] = other;
		cells[count] = (table.firstCells[row] ?? 0) + column;
		count += 1;
	}
	return { species, from, to, source: { table, cells: cells.subarray(0, count) } };
}

function hasHeader(first: readonly string[]): boolean {
	return FIRST_NAME_HEADER.test(first[0] ?? '') || isWord(first[valueColumn(first)] ?? '');
}

function valueColumn(first: readonly string[]): number {
	const named = first.findIndex((cell, index) => index > 1 && VALUE_HEADERS.includes(cell.toLowerCase()));
	return named === -1 ? 2 : named;
}

function nameAt(table: CellTable, row: number, index: 0 | 1): string {
	const name = plainName(cellAt(table, row, index));
	if (name !== '') return name;
	const where = { line: table.lines[row] ?? 0, column: index + 1 };
	throw new InputError(
		'unnamed-species',
		`Line ${where.line}, column ${where.column}: expected a species name; the cell is empty.`,
		where
	);
}

function otherColumns(column: number, header: string): Remark {
	const called = header === '' ? '' : ` (“${header}”)`;
	return remark(
		'look',
		'other-columns',
		`The list has more than three columns; the overlap was read from column ${column + 1}${called} and the others were left aside.`
	);
}
