import { MEASURE_NAMES, type Measure } from '#lib/contracts/measure.ts';
import type { Alternative } from '#lib/contracts/plan.ts';
import { treeWords } from './analyses/planWords.ts';

/** A stretch of the sentence; one with `href` leads to where that choice is made. */
export type QuestionPart = { readonly text: string; readonly href?: string };

export type QuestionFacts = {
	readonly study: string;
	/** species that tree and matrix share; null before both are there */
	readonly sharedSpecies: number | null;
	/** of the newest run; null before there is one */
	readonly measure: Measure | null;
	/** the tree set that was asked about last, else the newest, and which of its trees; null before there is one */
	readonly trees: { readonly label: string; readonly treeCount: number; readonly tree: number | 'all' } | null;
	/** the direction that was asked last */
	readonly alternative: Alternative;
};

const FALL: Readonly<Record<Alternative, string>> = { less: 'fall', greater: 'rise', 'two-sided': 'rise or fall' };

/** The question of a study as one sentence, as far as its materials say it; one plain part before there are any. */
export function questionParts({ study, sharedSpecies, measure, trees, alternative }: QuestionFacts): QuestionPart[] {
	const at = (page: string) => `/studies/${study}/${page}`;
	const fall = ` ${FALL[alternative]} with the age of the most recent common ancestor`;
	if (measure === null && trees === null) return [{ text: `Does niche overlap${fall}?` }];
	const across: QuestionPart[] =
		sharedSpecies === null
			? [{ text: 'Does ' }]
			: [
					{ text: 'Across ' },
					{ text: `${sharedSpecies.toLocaleString('en')} shared species`, href: at('names') },
					{ text: ', does ' }
				];
	const overlap: QuestionPart =
		measure === null ? { text: 'niche overlap' } : { text: MEASURE_NAMES[measure], href: at('overlaps') };
	if (trees === null) return [...across, overlap, { text: `${fall}?` }];
	return [...across, overlap, { text: `${fall} on ` }, { text: treesWords(trees), href: at('materials') }, { text: '?' }];
}

/** In the words of the plan: a tree goes by its label there and here. */
function treesWords({ label, treeCount, tree }: NonNullable<QuestionFacts['trees']>): string {
	return treeWords({ label, treeCount }, tree);
}
