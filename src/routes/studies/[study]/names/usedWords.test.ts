import { describe, expect, it } from 'vitest';
import { matchNames } from '#lib/analysis/names/matchNames.ts';
import { speciesUse, usedWords } from './usedWords.ts';

type Decisions = { from: string; to: string | null }[];
const use = (tips: string[], species: string[], decisions: Decisions = []) =>
	speciesUse(matchNames({ tips, species, decisions }));

// Expected counts by hand; names are invented.
describe('speciesUse', () => {
	it('counts a proposal and a species without a tip as open until a person decides', () => {
		const species = ['Rana alba', 'Rana tumidda', 'Bufo sericeus'];
		expect(use(['Rana alba', 'Rana tumida'], species)).toEqual({ species: 3, used: 1, open: 2, leftOut: 0 });
	});

	it('counts a species as left out once a person said so', () => {
		const decisions = [{ from: 'Bufo sericeus', to: null }];
		const counts = use(['Rana alba', 'Hyla montana'], ['Rana alba', 'Bufo sericeus'], decisions);
		expect(counts).toEqual({ species: 2, used: 1, open: 0, leftOut: 1 });
	});

	it('does not count open tips of the tree as species', () => {
		const counts = use(['Rana alba', 'Hyla montana', 'Bufo viridis'], ['Rana alba']);
		expect(counts).toEqual({ species: 1, used: 1, open: 0, leftOut: 0 });
	});
});

describe('usedWords', () => {
	it('calls nothing left out that still needs a person', () => {
		expect(usedWords({ species: 8, used: 7, open: 1, leftOut: 0 })).toBe('7 of 8 species will be used; 1 is open.');
	});

	it('tells the open from the left out', () => {
		expect(usedWords({ species: 8, used: 4, open: 1, leftOut: 3 })).toBe(
			'4 of 8 species will be used; 1 is open, 3 are left out.'
		);
		expect(usedWords({ species: 8, used: 7, open: 0, leftOut: 1 })).toBe('7 of 8 species will be used; 1 is left out.');
	});

	it('says so when every species is used', () => {
		expect(usedWords({ species: 8, used: 8, open: 0, leftOut: 0 })).toBe('All 8 species of the matrix will be used.');
	});
});
