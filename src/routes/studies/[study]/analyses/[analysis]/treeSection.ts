import { treeSentence, TREES_CAUTION } from '#lib/analysis/words/treeSentence.ts';
import type { Findings } from './findingsView.ts';

export const TREES = {
	id: 'trees',
	title: 'Over all trees',
	sentence: ({ trees, compared }: Findings) => (trees === undefined ? null : treeSentence(trees, compared.ageUnit)),
	caution: () => TREES_CAUTION,
	load: () => import('./sections/Trees.svelte')
};
