import { describe, expect, it } from 'vitest';
import { readingWords } from './readingWords.ts';

// Expected words by hand.
describe('readingWords', () => {
	it('says nothing of what was taken as it stood', () => {
		expect(readingWords({ shape: 'square', kind: 'similarity', scale: 'fraction', decimal: '.', separator: ',' })).toEqual([
			'read from a full square'
		]);
	});

	it('says every change of the values', () => {
		expect(readingWords({ shape: 'lower', kind: 'distance', scale: 'percent', decimal: ',' })).toEqual([
			'read from a lower half',
			'given as distances, turned into overlaps by 1 − value',
			'given in per cent, divided by 100',
			'decimal commas'
		]);
	});

	it('is silent about what an older version did not note', () => {
		expect(readingWords({})).toEqual([]);
	});
});
