import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { isMissing, isWord } from './cellNumber.ts';
import { refuseTooMany, type TextEntries } from './matrixEntries.ts';
import { plainName } from './plainName.ts';
import type { CellRow } from './readCells.ts';

const FIRST_NAME_HEADER = /^(species|taxon|sp|name|tip)[\s_.-]?(a|1|i|x)$/i;
const VALUE_HEADERS = ['overlap', 'similarity', 'distance', 'dissimilarity', 'value', 'd', 'i'];

type GrowingEntries = { readonly species: string[]; readonly text: string[] } & Record<
	'from' | 'to' | 'line' | 'column',
	number[]
>;

export type PairLayout = {
	readonly entries: TextEntries;
	/** the header of the column that was read, in lower case; '' without a header */
	readonly valueHeader: string;
	readonly remarks: readonly Remark[];
};

/** Whether the rows are a list of pairs: two names, then a value. A square has a value in its second cell. */
export function isPairList(rows: readonly CellRow[]): boolean {
	const [first] = rows;
	if (first === undefined) return false;
	if (FIRST_NAME_HEADER.test(first.cells[0] ?? '')) return true;
	const body = rows.length > 1 ? rows.slice(1) : rows;
	const named = body.filter(({ cells }) => isWord(cells[0] ?? '') && isWord(cells[1] ?? ''));
	const column = valueColumn(first);
	const valued = named.filter(({ cells }) => !isWord(cells[column] ?? ''));
	return named.length * 2 > body.length && valued.length * 2 > named.length;
}

/**
 * The pairs of a list with two names and a value in each row. A pair that is not listed is missing.
 * @throws {InputError} `unnamed-species`, `too-many-species`
 */
export function pairEntries(rows: readonly CellRow[]): PairLayout {
	const [first] = rows;
	const headed = first !== undefined && hasHeader(first);
	const column = headed ? valueColumn(first) : 2;
	const valueHeader = headed ? (first.cells[column] ?? '') : '';
	const index = new Map<string, number>();
	const entries: GrowingEntries = { species: [], from: [], to: [], line: [], column: [], text: [] };
	const indexOf = (name: string): number => {
		const known = index.get(name);
		if (known !== undefined) return known;
		index.set(name, entries.species.length);
		refuseTooMany(entries.species.push(name));
		return entries.species.length - 1;
	};
	for (const row of headed ? rows.slice(1) : rows) {
		const [from, to] = rowNames(row).map(indexOf);
		const text = row.cells[column] ?? '';
		if (from === undefined || to === undefined || isMissing(text)) continue;
		entries.from.push(from);
		entries.to.push(to);
		entries.text.push(text);
		entries.line.push(row.line);
		entries.column.push(column + 1);
	}
	const width = rows.reduce((widest, { cells }) => Math.max(widest, cells.length), 0);
	const remarks = width > 3 ? [otherColumns(column, valueHeader)] : [];
	return { entries, valueHeader: valueHeader.toLowerCase(), remarks };
}

function hasHeader(first: CellRow): boolean {
	return FIRST_NAME_HEADER.test(first.cells[0] ?? '') || isWord(first.cells[valueColumn(first)] ?? '');
}

function valueColumn(first: CellRow): number {
	const named = first.cells.findIndex((cell, index) => index > 1 && VALUE_HEADERS.includes(cell.toLowerCase()));
	return named === -1 ? 2 : named;
}

function rowNames({ line, cells }: CellRow): string[] {
	const names = [plainName(cells[0] ?? ''), plainName(cells[1] ?? '')];
	const nameless = names.indexOf('');
	if (nameless !== -1) {
		const where = { line, column: nameless + 1 };
		throw new InputError(
			'unnamed-species',
			`Line ${line}, column ${nameless + 1}: expected a species name; the cell is empty.`,
			where
		);
	}
	return names;
}

function otherColumns(column: number, header: string): Remark {
	const called = header === '' ? '' : ` (“${header}”)`;
	return remark(
		'look',
		'other-columns',
		`The list has more than three columns; the overlap was read from column ${column + 1}${called} and the others were left aside.`
	);
}
