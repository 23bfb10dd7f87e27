import { ALSO_CAUTION, alsoSentence } from '#lib/analysis/words/alsoSentence.ts';
import { CLADE_CAUTION, cladeSentence, sisterSentence } from '#lib/analysis/words/cladeSentence.ts';
import type { Findings } from './findingsView.ts';

export const ALSO_TESTED = {
	id: 'also-tested',
	title: 'Also tested',
	sentence: alsoSentence,
	caution: () => ALSO_CAUTION,
	load: () => import('./sections/AlsoTested.svelte')
};

export const CLADES = {
	id: 'clades',
	title: 'Clades',
	sentence: ({ clades, cladeTest, compared }: Findings) =>
		clades === undefined || cladeTest === undefined ? null : cladeSentence({ clades, test: cladeTest, alpha: compared.alpha }),
	caution: () => CLADE_CAUTION,
	load: () => import('./sections/Clades.svelte')
};

export const SISTERS = {
	id: 'sister-species',
	title: 'Sister species',
	sentence: ({ sisters }: Findings) => (sisters === undefined ? null : sisterSentence(sisters)),
	load: () => import('./sections/Sisters.svelte')
};
