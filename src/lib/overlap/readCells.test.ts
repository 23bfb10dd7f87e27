import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cellAt, cellPlace, cellText, rowCells, rowCount, type CellTable } from './cellTable.ts';
import { readCells } from './readCells.ts';

function cellsOf(table: CellTable): string[][] {
	return Array.from({ length: rowCount(table) }, (_, row) => rowCells(table, row));
}

describe('readCells', () => {
	// By hand: the blank third line is no row, and the fourth column is empty in every row.
	it('leaves out blank rows and columns that are empty to the right of everything', () => {
		const table = readCells('a,b,,\n\n , ,,\n"",c,d,\n');
		expect(cellsOf(table)).toEqual([
			['a', 'b', ''],
			['', 'c', 'd']
		]);
		expect([...table.lines]).toEqual([1, 4]);
	});

	it('ends a short row where it ends', () => {
		const table = readCells('a,b,c\nd');
		expect(rowCells(table, 1)).toEqual(['d']);
		expect(cellAt(table, 1, 1)).toBe('');
	});

	it('keeps a quotation mark that stands inside a plain cell or behind a tab', () => {
		expect(cellsOf(readCells('5" nail,b\n\t"c",d'))).toEqual([
			['5" nail', 'b'],
			['"c"', 'd']
		]);
	});

	// Property: RFC 4180 loses nothing of a cell but the blanks around it, whatever stands in it.
	it('gives back what was written between quotation marks', () => {
		const cell = fc.stringMatching(/^[a-z0-9 ,;"\n\r\t]{0,8}$/).map((text) => `x${text}x`);
		const rows = fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 5 });
		fc.assert(
			fc.property(rows, fc.constantFrom('\n', '\r\n', '\r'), (written, lineEnd) => {
				const quoted = written.map((cells) => cells.map((text) => `"${text.replaceAll('"', '""')}"`).join(','));
				expect(cellsOf(readCells(quoted.join(lineEnd)))).toEqual(written);
			})
		);
	});
});

describe('cellPlace', () => {
	// By hand: the quoted cell spans lines 2 and 3, line 4 is blank.
	it('tells line and column of each cell of the text', () => {
		const table = readCells('a,b\n"c\nc",d\n\ne,f');
		const places = Array.from(table.starts, (_, k) => {
			const { line, column } = cellPlace(table, k);
			return `${cellText(table, k).replace('\n', '+')} ${line}:${column}`;
		});
		expect(places).toEqual(['a 1:1', 'b 1:2', 'c+c 2:1', 'd 2:2', 'e 5:1', 'f 5:2']);
	});
});
