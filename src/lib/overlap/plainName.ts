/** A name of a table without the apostrophe that keeps a spreadsheet from running it as a formula (see `safeName`). */
export function plainName(cell: string): string {
	return /^'[=+\-@]/.test(cell) ? cell.slice(1) : cell;
}

/** A name safe to open in a spreadsheet: one that would start a formula gets an apostrophe in front. */
export function safeName(name: string): string {
	return /^[=+\-@\t\r]/.test(name) ? `'${name}` : name;
}
