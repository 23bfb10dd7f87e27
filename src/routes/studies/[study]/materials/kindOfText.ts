import type { MaterialKind } from '#lib/contracts/materialForms.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { looksLikeCovariate } from './looksLikeCovariate.ts';
import { looksLikeNiches } from './looksLikeNiches.ts';
import { recogniseText } from './recogniseText.ts';

/**
 * Whether a text is read as trees, as a matrix of overlaps, as a covariate or as a table of niche positions.
 * @throws {InputError} `rich-text` on a word processor's file, `no-material` on words without any number
 */
export function kindOfText(text: string): MaterialKind {
	const recognised = recogniseText(text);
	if (recognised === 'rich-text') {
		throw new InputError(
			'rich-text',
			'Expected plain text; this is a word processor’s file. Open it, choose Save as, and save it as plain text.'
		);
	}
	if (recognised === 'words') {
		throw new InputError(
			'no-material',
			'Expected a tree or a table of numbers; this text is neither. A tree would begin with a bracket or #NEXUS, and a table would hold numbers; there is none here.'
		);
	}
	if (recognised !== 'matrix') return recognised;
	if (looksLikeNiches(text)) return 'niches';
	return looksLikeCovariate(text) ? 'covariate' : 'matrix';
}
