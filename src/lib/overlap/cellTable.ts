import type { Separator } from './matrixReading.ts';

/**
 * The cells of a table as places in its text. Two thousand species make four million cells (six in a list of pairs);
 * as strings of their own they would take several times the text.
 */
export type CellTable = {
	readonly separator: Separator;
	readonly text: string;
	/** shape (rows,): the line each row starts on, counted from 1 */
	readonly lines: Int32Array;
	/** shape (rows + 1,): row r has the cells from `firstCells[r]` up to, without, `firstCells[r + 1]` */
	readonly firstCells: Int32Array;
	/** shape (cells,): where a cell starts and ends in the text, its quotation marks included */
	readonly starts: Int32Array;
	readonly ends: Int32Array;
	/** cells of the widest row, without what is empty to the right of everything; a row has no cells beyond it */
	readonly width: number;
};

const QUOTATION_MARK = 0x22;

export function rowCount(table: CellTable): number {
	return table.lines.length;
}

/** Cells of a row. */
export function rowLength({ firstCells, width }: CellTable, row: number): number {
	return Math.min((firstCells[row + 1] ?? 0) - (firstCells[row] ?? 0), width);
}

/** What a cell of a row says, without surrounding blanks and quotation marks; '' beyond the row. */
export function cellAt(table: CellTable, row: number, index: number): string {
	return index < rowLength(table, row) ? cellText(table, (table.firstCells[row] ?? 0) + index) : '';
}

/** What cell k of all cells says. */
export function cellText({ text, starts, ends }: Pick<CellTable, 'text' | 'starts' | 'ends'>, k: number): string {
	const [start, end] = [starts[k] ?? 0, ends[k] ?? 0];
	if (text.charCodeAt(start) !== QUOTATION_MARK || end <= start) return text.slice(start, end).trim();
	return text
		.slice(start + 1, end - 1)
		.replaceAll('""', '"')
		.trim();
}

export function rowCells(table: CellTable, row: number): string[] {
	return Array.from({ length: rowLength(table, row) }, (_, index) => cellAt(table, row, index));
}

/** Line and column of cell k of all cells, counted from 1. */
export function cellPlace({ firstCells, lines }: CellTable, k: number): { line: number; column: number } {
	let row = 0;
	for (let step = 1 << 30; step >= 1; step >>= 1) {
		if (row + step < lines.length && (firstCells[row + step] ?? 0) <= k) row += step;
	}
	return { line: lines[row] ?? 0, column: k - (firstCells[row] ?? 0) + 1 };
}
