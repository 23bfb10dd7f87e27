import type { Place } from '#lib/remarks/remark.ts';

const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;
const BYTE_ORDER_MARK = '\uFEFF';

/** A position a person can find: both count from 1; a byte order mark takes no column. */
export type LineColumn = Place & { readonly line: number; readonly column: number };

/**
 * Line and column of an offset in a text. Lines end with LF, CR or CRLF; columns count characters (code points).
 * Linear in the offset: meant for an error or the first of its kind, not for every token.
 */
export function placeAt(text: string, offset: number): LineColumn {
	let line = 1;
	let lineStart = text.startsWith(BYTE_ORDER_MARK) ? 1 : 0;
	for (let i = lineStart; i < offset; i++) {
		const code = text.charCodeAt(i);
		const endsLine = code === LINE_FEED || (code === CARRIAGE_RETURN && text.charCodeAt(i + 1) !== LINE_FEED);
		if (!endsLine) continue;
		line += 1;
		lineStart = i + 1;
	}
	return { line, column: [...text.slice(lineStart, offset)].length + 1 };
}

/** "line 3, column 14" */
export function placeInWords({ line, column }: LineColumn): string {
	return `line ${line}, column ${column}`;
}
