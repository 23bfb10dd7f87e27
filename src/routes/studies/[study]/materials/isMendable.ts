/** Refusals of files that are no text: what they hold cannot be read by a person either, and not be mended in a field. */
const NO_TEXT: ReadonlySet<string> = new Set(['spreadsheet-file', 'not-text', 'rich-text', 'empty']);

/** Whether a refused text can be mended where it stands. */
export function isMendable({ code }: { readonly code: string }): boolean {
	return !NO_TEXT.has(code);
}
