import { describe, expect, it } from 'vitest';
import { kindOfText } from './kindOfText.ts';
import { looksLikeNiches } from './looksLikeNiches.ts';

describe('looksLikeNiches', () => {
	it('knows a table of variables by its columns', () => {
		const table = 'species,temperature,temperature_se\nAa one,10,.2\nAb two,12,.1\nAc three,9,NA\nAd four,3,.3\nAe five,4,.1\n';
		expect(looksLikeNiches(table)).toBe(true);
		expect(kindOfText(table)).toBe('niches');
		expect(looksLikeNiches('sp;x\nA;1,5\nB;2\nC;3\n')).toBe(true);
	});

	it.each([
		['a square matrix', ',A,B,C\nA,1,.5,.2\nB,.5,1,.3\nC,.2,.3,1\n'],
		['one whose columns are spelled otherwise', 'x,Aa_one,Ab_two\nAa one,1,.4\nAb two,.4,1\n'],
		['a list of pairs', 'a,b,overlap\nA,B,.5\nA,C,.4\nB,C,.1\n'],
		['numbers without names of columns', 'A,1,2\nB,3,4\nC,5,6\n'],
		['a half without a diagonal', 'A\nB,.5\nC,.2,.3\nD,.1,.2,.3\n']
	])('leaves %s to the readers of matrices', (_, text) => {
		expect(looksLikeNiches(text)).toBe(false);
	});
});
