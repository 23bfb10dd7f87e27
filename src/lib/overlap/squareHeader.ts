import { isMissing, isWord } from './cellNumber.ts';
import { cellAt, rowCells, rowCount, rowLength, type CellTable } from './cellTable.ts';

/**
 * How a square table names its species. Cell `skip + j` of a body row is the value of column j; `columnNames` is
 * undefined when only the first column has names.
 */
export type SquareHeader = {
	readonly table: CellTable;
	/** row of the table that is the first of the body */
	readonly bodyStart: 0 | 1;
	readonly rowNames: readonly string[];
	readonly columnNames: readonly string[] | undefined;
	/** cell of the header row that names column 0 */
	readonly firstNamed: number;
	/** cells before the first value in a body row: 1, or 0 when only the header row has names */
	readonly skip: 0 | 1;
	/** the row names were numbers 1, 2, 3 … or absent, so the columns name the rows */
	readonly namedByHeader: boolean;
};

/** Finds the names of a square table: in the first row and column, in the first column only, or in the first row only. */
export function squareHeader(table: CellTable): SquareHeader {
	const head = rowCells(table, 0);
	if (isNamelessBody(head, table)) return headerOnly(table, { names: head, skip: 0, firstNamed: 0 });
	if (!isHeader(head, table)) {
		const rowNames = firstCells(table, 0);
		return { table, bodyStart: 0, rowNames, columnNames: undefined, firstNamed: 1, skip: 1, namedByHeader: false };
	}
	const rowNames = firstCells(table, 1);
	const firstNamed = hasCorner(head, table) ? 1 : 0;
	const columnNames = head.slice(firstNamed);
	if (isNumbering(rowNames) && columnNames.length === rowNames.length && columnNames.every(isWord)) {
		return headerOnly(table, { names: columnNames, skip: 1, firstNamed });
	}
	return { table, bodyStart: 1, rowNames, columnNames, firstNamed, skip: 1, namedByHeader: false };
}

function headerOnly(table: CellTable, header: { names: readonly string[]; skip: 0 | 1; firstNamed: number }): SquareHeader {
	return {
		table,
		bodyStart: 1,
		rowNames: header.names,
		columnNames: header.names,
		firstNamed: header.firstNamed,
		skip: header.skip,
		namedByHeader: true
	};
}

/** The first cell of each row from `start` on. */
function firstCells(table: CellTable, start: 0 | 1): string[] {
	return Array.from({ length: rowCount(table) - start }, (_, row) => cellAt(table, start + row, 0));
}

/** The widest row below the first. */
function bodyWidth(table: CellTable): number {
	let widest = 0;
	for (let row = 1; row < rowCount(table); row++) widest = Math.max(widest, rowLength(table, row));
	return widest;
}

/** A header of words over as many rows of numbers, none of which begins with a name. */
function isNamelessBody(head: readonly string[], table: CellTable): boolean {
	if (rowCount(table) - 1 !== head.length || head.length < 2 || !head.every(isWord)) return false;
	return bodyWidth(table) <= head.length && !firstCells(table, 1).some(isWord);
}

/** Species may be numbers, so a first row that repeats the first column is a header too. */
function isHeader(head: readonly string[], table: CellTable): boolean {
	const tail = head.slice(1).filter((cell) => !isMissing(cell));
	if (rowCount(table) === 1) return false;
	const words = tail.filter(isWord).length;
	if (tail.length > 0 && words * 2 >= tail.length) return true;
	const below = new Set(firstCells(table, 1));
	return tail.length >= 2 && tail.length === below.size && tail.every((cell) => below.has(cell));
}

/** The corner is empty or a word that is no species; without one the header is a cell shorter than the rows below. */
function hasCorner(head: readonly string[], table: CellTable): boolean {
	const corner = head[0] ?? '';
	if (corner === '') return true;
	return head.length !== bodyWidth(table) - 1 && !firstCells(table, 1).includes(corner);
}

function isNumbering(rowNames: readonly string[]): boolean {
	return rowNames.every((name, index) => name === String(index + 1));
}
