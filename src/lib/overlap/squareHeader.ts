import { isMissing, isWord } from './cellNumber.ts';
import type { CellRow } from './readCells.ts';

/**
 * How a square table names its species. `cells[skip + j]` of a body row is the value of column j; `columnNames` is
 * undefined when only the first column has names.
 */
export type SquareHeader = {
	readonly body: readonly CellRow[];
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
export function squareHeader(rows: readonly CellRow[]): SquareHeader {
	const [first, ...rest] = rows;
	const head = first?.cells ?? [];
	if (isNamelessBody(head, rest)) return headerOnly(rest, { names: head, skip: 0, firstNamed: 0 });
	if (!isHeader(head, rest)) {
		return { body: rows, rowNames: names(rows), columnNames: undefined, firstNamed: 1, skip: 1, namedByHeader: false };
	}
	const rowNames = names(rest);
	const firstNamed = hasCorner(head, rest) ? 1 : 0;
	const columnNames = head.slice(firstNamed);
	if (isNumbering(rowNames) && columnNames.length === rowNames.length && columnNames.every(isWord)) {
		return headerOnly(rest, { names: columnNames, skip: 1, firstNamed });
	}
	return { body: rest, rowNames, columnNames, firstNamed, skip: 1, namedByHeader: false };
}

function headerOnly(
	body: readonly CellRow[],
	header: { names: readonly string[]; skip: 0 | 1; firstNamed: number }
): SquareHeader {
	return {
		body,
		rowNames: header.names,
		columnNames: header.names,
		firstNamed: header.firstNamed,
		skip: header.skip,
		namedByHeader: true
	};
}

function names(rows: readonly CellRow[]): string[] {
	return rows.map(({ cells }) => cells[0] ?? '');
}

/** A header of words over as many rows of numbers, none of which begins with a name. */
function isNamelessBody(head: readonly string[], rest: readonly CellRow[]): boolean {
	if (rest.length !== head.length || head.length < 2 || !head.every(isWord)) return false;
	return rest.every(({ cells }) => cells.length <= head.length && !isWord(cells[0] ?? ''));
}

/** Species may be numbers, so a first row that repeats the first column is a header too. */
function isHeader(head: readonly string[], rest: readonly CellRow[]): boolean {
	const tail = head.slice(1).filter((cell) => !isMissing(cell));
	if (rest.length === 0) return false;
	const words = tail.filter(isWord).length;
	if (tail.length > 0 && words * 2 >= tail.length) return true;
	const below = new Set(names(rest));
	return tail.length >= 2 && tail.length === below.size && tail.every((cell) => below.has(cell));
}

/** The corner is empty or a word that is no species; without one the header is a cell shorter than the rows below. */
function hasCorner(head: readonly string[], rest: readonly CellRow[]): boolean {
	const corner = head[0] ?? '';
	if (corner === '') return true;
	const width = rest.reduce((widest, { cells }) => Math.max(widest, cells.length), 0);
	return head.length !== width - 1 && !rest.some(({ cells }) => cells[0] === corner);
}

function isNumbering(rowNames: readonly string[]): boolean {
	return rowNames.every((name, index) => name === String(index + 1));
}
