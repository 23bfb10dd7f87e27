/**
 * One cell by RFC 4180. A text that a spreadsheet would run as a formula gets an apostrophe in front; a number is written
 * with the fewest digits that read back as the same double, and a missing one as an empty cell.
 */
export function csvCell(value: string | number | null): string {
	if (value === null) return '';
	if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
	const harmless = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
	return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

export function csvLine(cells: readonly (string | number | null)[]): string {
	return `${cells.map(csvCell).join(',')}\r\n`;
}

/** Lines are gathered to about this many characters before they are sent. */
const PART_LENGTH = 64 * 1024;

/** A table of any length, made while it is sent: the next part is built only when the reader has taken the last. */
export function csvResponse(fileName: string, lines: Iterator<string>): Response {
	const encoder = new TextEncoder();
	const body = new ReadableStream<Uint8Array>({
		pull(controller) {
			const part = nextPart(lines);
			if (part === '') controller.close();
			else controller.enqueue(encoder.encode(part));
		},
		cancel() {
			lines.return?.();
		}
	});
	return new Response(body, {
		headers: {
			'content-type': 'text/csv; charset=utf-8; header=present',
			'content-disposition': attachment(fileName),
			'cache-control': 'private, no-store'
		}
	});
}

function nextPart(lines: Iterator<string>): string {
	let part = '';
	while (part.length < PART_LENGTH) {
		const next = lines.next();
		if (next.done === true) break;
		part += next.value;
	}
	return part;
}

/** @see RFC 6266: a plain name for every client, and the full one in UTF-8 */
export function attachment(fileName: string): string {
	const plain = fileName.replace(/[^\w.-]+/g, '-');
	const full = encodeURIComponent(fileName).replace(/['()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`);
	return `attachment; filename="${plain}"; filename*=UTF-8''${full}`;
}
