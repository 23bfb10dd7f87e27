import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { parseNewick } from './newick.ts';
import { parseNexus } from './nexus.ts';
import type { NamedTree } from './tree.ts';

const NEXUS_START = /^\uFEFF?\s*#nexus(?![^\s;[])/i;

/** What a tree text holds; remarks tell what was noticed while reading, each kind once, with its count and first place. */
export type TreesRead = { readonly format: 'newick' | 'nexus'; readonly trees: NamedTree[]; readonly remarks: Remark[] };

/**
 * Trees of a text, which is NEXUS when it begins with `#NEXUS` and Newick otherwise. Line ends may be LF, CR or CRLF; a
 * byte order mark is passed over.
 *
 * @throws {InputError} `empty-text` when only blanks are there, and the codes of `parseNewick` and `parseNexus`
 */
export function readTrees(text: string): TreesRead {
	if (text.trim() === '') {
		const message = 'Expected a tree; the text is empty (line 1, column 1). Paste a Newick or NEXUS text or choose a file.';
		throw new InputError('empty-text', message, { line: 1, column: 1 });
	}
	return NEXUS_START.test(text) ? { format: 'nexus', ...parseNexus(text) } : { format: 'newick', ...parseNewick(text) };
}
