import { describe, expect, it } from 'vitest';
import { matrixFactWords, treeFactWords, treeKindWords } from './materialWords.ts';

const tree = { tipCount: 26, rootAge: 18.4, ageUnit: 'Ma', ultrametricSpread: 0, polytomies: 0 } as const;

// Expected words by hand.
describe('treeFactWords', () => {
	it('tells a dated, resolved tree', () => {
		expect(treeFactWords(tree)).toEqual(['26 tips', 'root 18.4 Ma', 'all tips end together', 'no unresolved node']);
	});

	it('tells how far tips end apart, small spreads with one digit', () => {
		expect(treeFactWords({ ...tree, ultrametricSpread: 0.00003 })[2]).toBe('tips end within 0.003 % of one another');
		expect(treeFactWords({ ...tree, ultrametricSpread: 0.012 })[2]).toBe('tips end within 1.2 % of one another');
	});

	it('claims no age and no spread where lengths are missing', () => {
		expect(treeFactWords({ ...tree, rootAge: null, ultrametricSpread: null, polytomies: 1 })).toEqual([
			'26 tips',
			'branch lengths are missing',
			'1 unresolved node'
		]);
	});
});

describe('treeKindWords', () => {
	it('counts trees by what they are', () => {
		expect([treeKindWords('summary', 1), treeKindWords('posterior', 200), treeKindWords('summary', 3)]).toEqual([
			'summary tree',
			'200 posterior trees',
			'3 summary trees'
		]);
	});
});

describe('matrixFactWords', () => {
	const figures = { species: 26, pairs: 325, missing: 0, min: 0.011, max: 0.987, mean: 0.4 };

	it('tells a whole matrix', () => {
		expect(matrixFactWords(figures)).toEqual(['26 species', '325 pairs', 'overlap 0.01 to 0.99, mean 0.40']);
	});

	it('tells missing pairs beside all there would be', () => {
		expect(matrixFactWords({ ...figures, pairs: 320, missing: 5 })[1]).toBe('320 of 325 pairs, 5 missing');
	});

	it('gives no figures when no pair has a value', () => {
		expect(matrixFactWords({ ...figures, pairs: 0, missing: 325 })).toHaveLength(2);
	});
});
