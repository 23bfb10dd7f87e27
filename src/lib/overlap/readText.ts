import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';

export type DecodedText = { readonly text: string; readonly remarks: readonly Remark[] };

/**
 * The text of a file, whatever its encoding: UTF-8, UTF-16 with a byte order mark or told by its zero bytes, and
 * Windows-1252 when the bytes are not UTF-8 (with a remark). A leading byte order mark is dropped.
 *
 * @throws {InputError} `spreadsheet-file` on a workbook, `not-text` on other binary data, `empty` when nothing is written
 */
export function readText(source: string | Uint8Array): DecodedText {
	if (isWorkbook(source)) {
		throw new InputError(
			'spreadsheet-file',
			'Expected a text table; this is a spreadsheet workbook. Open it, choose Save as, and save the one sheet with the matrix as CSV.'
		);
	}
	const decoded = typeof source === 'string' ? { text: source, remarks: [] } : decodeBytes(source);
	const text = decoded.text.startsWith('\uFEFF') ? decoded.text.slice(1) : decoded.text;
	if (text.includes('\0')) {
		throw new InputError(
			'not-text',
			'Expected a text table; this file holds binary data. Save the matrix as CSV or tab-separated text.'
		);
	}
	if (text.trim() === '') throw new InputError('empty', 'Expected a matrix or a list of pairs; the text is empty.');
	return { text, remarks: decoded.remarks };
}

/** Zip archives (xlsx, ods, numbers) begin with PK, older workbooks with D0 CF 11 E0. */
function isWorkbook(source: string | Uint8Array): boolean {
	if (typeof source === 'string') return source.startsWith('PK\u0003\u0004') || source.startsWith('\u00D0\u00CF\u0011\u00E0');
	const [a, b, c, d] = source;
	return (a === 0x50 && b === 0x4b && c === 3 && d === 4) || (a === 0xd0 && b === 0xcf && c === 0x11 && d === 0xe0);
}

function decodeBytes(bytes: Uint8Array): DecodedText {
	const sixteen = utf16Label(bytes);
	if (sixteen !== undefined) return { text: new TextDecoder(sixteen).decode(bytes), remarks: [] };
	try {
		return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), remarks: [] };
	} catch {
		const message =
			'The file is not UTF-8; it was read as Windows-1252. Look at names with accents, and save as UTF-8 if they are wrong.';
		return { text: new TextDecoder('windows-1252').decode(bytes), remarks: [remark('look', 'not-utf-8', message)] };
	}
}

/** Without a mark, a zero in one byte of the first pair tells UTF-16: a table begins with an ASCII letter, digit or separator. */
function utf16Label(bytes: Uint8Array): 'utf-16le' | 'utf-16be' | undefined {
	const [first, second] = bytes;
	if (first === 0xff && second === 0xfe) return 'utf-16le';
	if (first === 0xfe && second === 0xff) return 'utf-16be';
	if (bytes.length < 2 || first === second) return undefined;
	if (second === 0) return 'utf-16le';
	return first === 0 ? 'utf-16be' : undefined;
}
