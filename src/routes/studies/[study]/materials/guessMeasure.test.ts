import { describe, expect, it } from 'vitest';
import { guessMeasure } from './guessMeasure.ts';

// Expected measures by hand, from the words of each name.
describe('guessMeasure', () => {
	it.each([
		['overlap-d.csv', 'schoener-d'],
		['overlap_I.txt', 'warren-i'],
		['Schoener’s D, 2.5 minutes.csv', 'schoener-d'],
		['jaccard_ranges.tsv', 'jaccard'],
		['Sørensen.csv', 'sorensen']
	])('reads %s', (name, measure) => {
		expect(guessMeasure(name)).toBe(measure);
	});

	it.each([['matrix.csv'], [''], ['d-and-i.csv'], ['dunes.csv'], ['island.i.d.csv']])('guesses nothing from “%s”', (name) => {
		expect(guessMeasure(name)).toBeUndefined();
	});
});
