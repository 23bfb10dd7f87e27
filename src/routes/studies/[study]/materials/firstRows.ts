/** Lines that tell what a table holds. */
const LOOKED_AT = 40;

/** The first rows of a table as plain cells, decimal commas as points; the reader proper knows quotes, a guess need not. */
export function firstRows(text: string): string[][] {
	const lines = text.split(/\r\n|\n|\r/, LOOKED_AT + 1).filter((line) => line.trim() !== '');
	const separator = ['\t', ';', ','].find((sign) => lines[0]?.includes(sign)) ?? ',';
	return lines.map((line) =>
		line.split(separator).map((cell) =>
			cell
				.trim()
				.replace(/^"(.*)"$/, '$1')
				.replace(',', '.')
		)
	);
}
