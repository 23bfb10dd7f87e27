import { InputError } from '#lib/remarks/inputError.ts';
import type { Separator } from './matrixReading.ts';

/** One row of a table: the line it starts on, counted from 1, and its cells without surrounding blanks. */
export type CellRow = { readonly line: number; readonly cells: readonly string[] };
export type CellTable = { readonly separator: Separator; readonly rows: readonly CellRow[] };

const SEPARATORS: readonly Separator[] = ['\t', ';', ','];
const SAMPLED_LINES = 40;

/**
 * Splits a text into cells by RFC 4180: a cell may stand in double quotes and then hold separators, line ends and
 * doubled quotes. Lines end in CRLF, LF or CR. Blank rows and columns that are empty to the right of everything are dropped.
 *
 * A reader of our own: the library at hand needs a global of Node in the browser, and its browser build takes 11 s for
 * 2,000 species.
 *
 * @throws {InputError} `no-separator`, `not-a-matrix` for a tree, `open-quote`, `stray-quote`
 */
export function readCells(text: string): CellTable {
	const separator = sniffSeparator(text);
	const rows = splitRows(text, separator).filter(({ cells }) => cells.some((cell) => cell !== ''));
	const width = rows.reduce((widest, { cells }) => Math.max(widest, cells.findLastIndex((cell) => cell !== '') + 1), 0);
	return { separator, rows: rows.map(({ line, cells }) => ({ line, cells: cells.slice(0, width) })) };
}

/** The separator that stands on at least half of the first lines; tab before semicolon before comma, as decimal commas look like separators. */
function sniffSeparator(text: string): Separator {
	const lines = text
		.slice(0, 200_000)
		.replace(/"[^"]*"/g, '')
		.split(/\r\n|\n|\r/)
		.filter((line) => line.trim() !== '')
		.slice(0, SAMPLED_LINES);
	const carriers = (separator: Separator) => lines.filter((line) => line.includes(separator)).length;
	const found =
		SEPARATORS.find((separator) => carriers(separator) * 2 >= lines.length) ?? SEPARATORS.find((s) => carriers(s) > 0);
	if (found !== undefined && !looksLikeTree(text)) return found;
	if (looksLikeTree(text)) {
		throw new InputError('not-a-matrix', 'Expected a matrix; this text reads as a tree. Bring it as a tree set instead.', {
			line: 1
		});
	}
	throw new InputError(
		'no-separator',
		'Expected cells separated by commas, semicolons or tabs; the text has none of them. Save the matrix as CSV.',
		{
			line: 1
		}
	);
}

function looksLikeTree(text: string): boolean {
	return /^\s*#NEXUS/i.test(text) || /^\s*\([^]*\)[^()]*;\s*$/.test(text);
}

function splitRows(text: string, separator: Separator): CellRow[] {
	return text.includes('"') ? splitQuoted(text, separator) : splitPlain(text, separator);
}

function splitPlain(text: string, separator: Separator): CellRow[] {
	return text
		.split(/\r\n|\n|\r/)
		.map((line, index) => ({ line: index + 1, cells: line.split(separator).map((cell) => cell.trim()) }));
}

function splitQuoted(text: string, separator: Separator): CellRow[] {
	const rows: CellRow[] = [];
	let cells: string[] = [];
	let line = 1;
	let startLine = 1;
	let at = 0;
	while (at <= text.length) {
		const cell = takeCell(text, at, { separator, line, column: cells.length + 1 });
		cells.push(cell.text);
		line += cell.lineEnds;
		at = cell.end;
		if (text[at] === separator) {
			at += 1;
			continue;
		}
		rows.push({ line: startLine, cells });
		cells = [];
		at += text.startsWith('\r\n', at) ? 2 : 1;
		line += 1;
		startLine = line;
	}
	return rows;
}

type CellStart = { readonly separator: Separator; readonly line: number; readonly column: number };
type TakenCell = { readonly text: string; readonly end: number; readonly lineEnds: number };

/** The cell that starts at `at`; `end` is the place of the separator or line end behind it. */
function takeCell(text: string, at: number, start: CellStart): TakenCell {
	let from = at;
	while (text[from] === ' ') from += 1;
	if (text[from] === '"') return takeQuoted(text, from, start);
	let end = from;
	while (end < text.length && !endsCell(text[end], start.separator)) end += 1;
	return { text: text.slice(at, end).trim(), end, lineEnds: 0 };
}

function takeQuoted(text: string, open: number, start: CellStart): TakenCell {
	let close = text.indexOf('"', open + 1);
	while (close !== -1 && text[close + 1] === '"') close = text.indexOf('"', close + 2);
	const where = { line: start.line, column: start.column };
	const place = `Line ${start.line}, column ${start.column}`;
	if (close === -1)
		throw new InputError('open-quote', `${place}: expected the quotation mark to be closed; the text ends before it is.`, where);
	const inside = text.slice(open + 1, close).replaceAll('""', '"');
	let end = close + 1;
	while (text[end] === ' ') end += 1;
	if (end < text.length && !endsCell(text[end], start.separator)) {
		throw new InputError(
			'stray-quote',
			`${place}: expected a separator after “${inside}”; more text follows the closing quotation mark.`,
			where
		);
	}
	return { text: inside.trim(), end, lineEnds: (inside.match(/\r\n|\n|\r/g) ?? []).length };
}

function endsCell(sign: string | undefined, separator: Separator): boolean {
	return sign === separator || sign === '\n' || sign === '\r';
}
