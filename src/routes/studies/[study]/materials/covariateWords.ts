import { formatCount } from '#lib/analysis/words/numbers.ts';
import type { CovariateReadingNotes } from '#lib/contracts/covariates.ts';

const KINDS = { distance: 'distances', similarity: 'similarities' } as const;

/** What is known of a covariate, a few words a fact. */
export function covariateFactWords(speciesCount: number, { reading }: { readonly reading: CovariateReadingNotes }): string[] {
	return [
		reading.source === 'places' ? 'great-circle distances in km' : KINDS[reading.kind],
		...(reading.scale === 'log' ? ['ln(1 + value)'] : []),
		`${formatCount(speciesCount)} species`
	];
}
