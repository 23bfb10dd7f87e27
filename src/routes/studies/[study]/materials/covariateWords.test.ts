import { describe, expect, it } from 'vitest';
import { covariateFactWords } from './covariateWords.ts';

const reading = { source: 'matrix', kind: 'similarity', scale: 'plain', unit: null, separator: ',' } as const;

// Expected words by hand.
describe('covariateFactWords', () => {
	it('tells what the values are, how they count and of how many species', () => {
		expect(covariateFactWords(1200, { reading })).toEqual(['similarities', '1,200 species']);
		expect(
			covariateFactWords(4, { reading: { ...reading, source: 'places', kind: 'distance', scale: 'log', unit: 'km' } })
		).toEqual(['great-circle distances in km', 'ln(1 + value)', '4 species']);
	});
});
