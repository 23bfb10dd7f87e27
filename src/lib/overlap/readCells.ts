import { InputError } from '#lib/remarks/inputError.ts';
import { cellText, type CellTable } from './cellTable.ts';
import type { Separator } from './matrixReading.ts';

const SEPARATORS: readonly Separator[] = ['\t', ';', ','];
const SAMPLED_LINES = 40;
const SPACE = 0x20;
const QUOTATION_MARK = 0x22;
const LINE_FEED = 0x0a;
const CARRIAGE_RETURN = 0x0d;

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
	return splitRows(text, sniffSeparator(text));
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

type Scan = {
	readonly text: string;
	readonly separator: Separator;
	readonly starts: Int32Array;
	readonly ends: Int32Array;
	cellCount: number;
	line: number;
};

function splitRows(text: string, separator: Separator): CellTable {
	const most = countEnds(text, separator);
	const scan: Scan = {
		text,
		separator,
		starts: new Int32Array(most.cells),
		ends: new Int32Array(most.cells),
		cellCount: 0,
		line: 1
	};
	const lines = new Int32Array(most.lines);
	const firstCells = new Int32Array(most.lines + 1);
	let [rows, width, at] = [0, 0, 0];
	while (at <= text.length) {
		const [line, first] = [scan.line, scan.cellCount];
		at = takeRow(scan, at);
		const filled = filledLength(scan, first);
		width = Math.max(width, filled);
		if (filled === 0) scan.cellCount = first;
		else {
			lines[rows] = line;
			rows += 1;
			firstCells[rows] = scan.cellCount;
		}
	}
	return {
		separator,
		text,
		lines: lines.subarray(0, rows),
		firstCells: firstCells.subarray(0, rows + 1),
		starts: scan.starts.subarray(0, scan.cellCount),
		ends: scan.ends.subarray(0, scan.cellCount),
		width
	};
}

/** How many cells and lines there are at most; fewer when quoted cells hold separators or line ends. */
function countEnds(text: string, separator: Separator): { cells: number; lines: number } {
	const separatorCode = separator.charCodeAt(0);
	let [separators, lineEnds] = [0, 0];
	for (let at = 0; at < text.length; at++) {
		const code = text.charCodeAt(at);
		if (code === separatorCode) separators += 1;
		else if (isLineEnd(code)) lineEnds += 1;
	}
	return { cells: separators + lineEnds + 1, lines: lineEnds + 1 };
}

/** Takes the cells of one row; returns where the next one starts. */
function takeRow(scan: Scan, from: number): number {
	const { text, separator, starts, ends } = scan;
	const separatorCode = separator.charCodeAt(0);
	const first = scan.cellCount;
	for (let at = from; ; at += 1) {
		const start = quotedStart(text, at);
		const column = scan.cellCount - first + 1;
		const end = start === -1 ? plainEnd(text, at, separatorCode) : takeQuoted(scan, start, { line: scan.line, column });
		starts[scan.cellCount] = start === -1 ? at : start;
		if (start === -1) ends[scan.cellCount] = end;
		scan.cellCount += 1;
		at = end;
		if (text.charCodeAt(at) === separatorCode) continue;
		scan.line += 1;
		return at + (text.startsWith('\r\n', at) ? 2 : 1);
	}
}

/** Where the quotation mark stands that opens the cell at `at`; -1 for a plain cell. */
function quotedStart(text: string, at: number): number {
	let from = at;
	while (text.charCodeAt(from) === SPACE) from += 1;
	return text.charCodeAt(from) === QUOTATION_MARK ? from : -1;
}

function plainEnd(text: string, at: number, separatorCode: number): number {
	let end = at;
	for (; end < text.length; end++) {
		const code = text.charCodeAt(end);
		if (code === separatorCode || isLineEnd(code)) break;
	}
	return end;
}

/** Notes where the cell closes and the lines it spans; returns the place of the separator or line end behind it. */
function takeQuoted(scan: Scan, open: number, where: { line: number; column: number }): number {
	const { text, separator } = scan;
	let close = text.indexOf('"', open + 1);
	while (close !== -1 && text[close + 1] === '"') close = text.indexOf('"', close + 2);
	const place = `Line ${where.line}, column ${where.column}`;
	if (close === -1)
		throw new InputError('open-quote', `${place}: expected the quotation mark to be closed; the text ends before it is.`, where);
	const inside = text.slice(open + 1, close).replaceAll('""', '"');
	let end = close + 1;
	while (text[end] === ' ') end += 1;
	if (end < text.length && text[end] !== separator && !isLineEnd(text.charCodeAt(end))) {
		throw new InputError(
			'stray-quote',
			`${place}: expected a separator after “${inside}”; more text follows the closing quotation mark.`,
			where
		);
	}
	scan.ends[scan.cellCount] = close + 1;
	if (inside.includes('\n') || inside.includes('\r')) scan.line += (inside.match(/\r\n|\n|\r/g) ?? []).length;
	return end;
}

function isLineEnd(code: number): boolean {
	return code === LINE_FEED || code === CARRIAGE_RETURN;
}

/** Cells of the row that starts with cell `first`, without the empty ones at its end. */
function filledLength(scan: Scan, first: number): number {
	let end = scan.cellCount;
	while (end > first && cellText(scan, end - 1) === '') end -= 1;
	return end - first;
}
