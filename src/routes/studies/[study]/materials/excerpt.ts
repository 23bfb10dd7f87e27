import type { Place } from '#lib/remarks/remark.ts';

export type ExcerptLine = {
	readonly number: number;
	/** what stands before, in and after the marked place; all in `before` on a line without one */
	readonly before: string;
	readonly marked: string;
	readonly after: string;
	readonly isAtFault: boolean;
};

/** Lines shown on each side of the one at fault, and signs on each side of the place in it. */
const LINES_AROUND = 2;
const SIGNS_AROUND = 60;

/**
 * The lines around the place an error points to, cut to what fits beside it: a tree is often one line of millions of signs.
 *
 * @param unit - what `where.column` counts: signs of the line in a tree text, cells in a table
 * @returns no lines when the error points nowhere
 */
export function excerpt(text: string, where: Place | undefined, unit: 'signs' | 'cells'): ExcerptLine[] {
	const { line, column } = where ?? {};
	if (line === undefined) return [];
	const first = Math.max(1, line - LINES_AROUND);
	return linesFrom(text, first, line + LINES_AROUND).map((content, index) => {
		const number = first + index;
		if (number !== line) return { number, before: clipped(content), marked: '', after: '', isAtFault: false };
		const [from, to] = column === undefined ? [0, 0] : unit === 'signs' ? [column - 1, column] : cellRange(content, column);
		return { number, ...around(content, from, to), isAtFault: true };
	});
}

/** Lines `from` to `to`, counted from 1, without splitting the whole text. */
function linesFrom(text: string, from: number, to: number): string[] {
	const ends = /\r\n|\n|\r/g;
	const lines: string[] = [];
	let start = 0;
	for (let number = 1; number <= to && start <= text.length; number++) {
		ends.lastIndex = start;
		const end = ends.exec(text);
		if (number >= from) lines.push(text.slice(start, end?.index ?? text.length));
		start = end === null ? text.length + 1 : ends.lastIndex;
	}
	return lines;
}

function around(content: string, from: number, to: number) {
	const start = Math.max(0, from - SIGNS_AROUND);
	const end = Math.min(content.length, to + SIGNS_AROUND);
	return {
		before: (start > 0 ? '…' : '') + content.slice(start, from),
		marked: clipped(content.slice(from, to)),
		after: content.slice(to, end) + (end < content.length ? '…' : '')
	};
}

/** A marked cell may be as long as a text; what is cut away is told by dots. */
function clipped(marked: string): string {
	return marked.length > 2 * SIGNS_AROUND ? `${marked.slice(0, 2 * SIGNS_AROUND)}…` : marked;
}

/** Where a cell stands in its line; quotes hold separators together. */
function cellRange(content: string, column: number): [number, number] {
	const separator = ['\t', ';', ','].find((sign) => content.includes(sign)) ?? ',';
	let [start, cell, isQuoted] = [0, 1, false];
	for (let at = 0; at <= content.length; at++) {
		if (content[at] === '"') isQuoted = !isQuoted;
		if (at < content.length && (isQuoted || content[at] !== separator)) continue;
		if (cell === column) return [start, at];
		start = at + 1;
		cell += 1;
	}
	return [content.length, content.length];
}
