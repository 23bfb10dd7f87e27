export type Recognised = 'trees' | 'matrix' | 'rich-text' | 'words';

/** Beyond this nothing more is learnt about what a text is. */
const LOOKED_AT = 4096;

/**
 * What a text is by its beginning: trees open with `#NEXUS`, a NEXUS block or a bracket, after comments in square
 * brackets; a word processor's file tells itself; everything else is read as a table, unless no digit stands in the whole.
 */
export function recogniseText(text: string): Recognised {
	const start = text
		.slice(0, LOOKED_AT)
		.replace(/^\uFEFF/, '')
		.trimStart();
	if (start.startsWith('{\\rtf')) return 'rich-text';
	if (/^#nexus\b/i.test(start)) return 'trees';
	const bare = start.replace(/^(\[[^\]]*\]\s*)+/, '');
	if (bare.startsWith('(') || /^(begin\s+\w+\s*;|u?tree\s+\S+\s*=)/i.test(bare)) return 'trees';
	// The names above a large table fill more than its beginning, so the whole text is searched.
	return /^[[{]/.test(start) || /\d/.test(text) ? 'matrix' : 'words';
}
