import { describe, expect, it } from 'vitest';
import { readMatrix } from '#lib/overlap/readMatrix.ts';
import { ultrametricRemark } from '#lib/phylogeny/ultrametric.ts';
import { pageRemarks, pageWords } from './pageWords.ts';

const table = (...rows: string[]) => ['species,A a,B b,C c', ...rows].join('\n');

// One text for each question the readers ask; the sentences come from the readers themselves, so that a new wording there
// is noticed here.
const ASKING = {
	asymmetric: table('A a,1,0.2,0.3', 'B b,0.4,1,0.5', 'C c,0.3,0.5,1'),
	'zero-filled-half': table('A a,1,0,0', 'B b,0.4,1,0', 'C c,0.3,0.5,1'),
	'similarity-or-distance': table('A a,0,0.2,0.3', 'B b,0.2,0,0.5', 'C c,0.3,0.5,0'),
	'percent-or-fraction': table('A a,100,20,30', 'B b,20,100,50', 'C c,30,50,100'),
	'negative-overlap': table('A a,1,-0.2,0.3', 'B b,-0.2,1,0.5', 'C c,0.3,0.5,1')
};
const API_WORDS = /confirm the|Confirm|`/;

describe('pageWords', () => {
	it.each(Object.entries(ASKING))('asks without the words of the API: %s', (code, text) => {
		const found = readMatrix(text, { measure: 'other' }).remarks.find((one) => one.code === code);
		expect(found?.message).toMatch(API_WORDS);
		expect(pageWords(found?.message ?? '')).not.toMatch(API_WORDS);
		expect(pageWords(found?.message ?? '')).toMatch(/say (that|what|which)/i);
	});

	it('asks about tips that end apart', () => {
		const { message } = ultrametricRemark(0.01);
		expect(pageWords(message)).toContain('Say that all species live now, and the tips will be extended');
	});

	// By hand, from the sentence of the reader of tree sets.
	it('says of a burn-in that is too long what to do', () => {
		const said = 'Expected `burnIn` to leave at least one tree; the text holds 20 and `burnIn` is 30. Give a smaller number.';
		expect(pageWords(said)).toBe('The text holds 20 trees, so leaving out the first 30 leaves none. Leave out fewer.');
	});

	it('drops the pointer to a field of the answer', () => {
		expect(pageWords('Settle it first. (2 more: see `remarks`)')).toBe('Settle it first.');
	});

	it('leaves every other sentence, and the rest of a remark, alone', () => {
		const remark = { level: 'look', code: 'x', message: 'All tips end at the same time.' };
		expect(pageRemarks([remark])).toEqual([remark]);
	});
});
