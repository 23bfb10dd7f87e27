import { covariateCaution, covariateSentence } from '#lib/analysis/words/covariateSentence.ts';

export const COVARIATES = {
	id: 'covariates',
	title: 'After allowing for covariates (does not remove spatial structure)',
	sentence: covariateSentence,
	caution: covariateCaution,
	load: () => import('./sections/Covariates.svelte')
};
