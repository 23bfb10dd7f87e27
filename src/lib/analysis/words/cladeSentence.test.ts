import { describe, expect, it } from 'vitest';
import { CLADE_CAUTION, cladeSentence, sisterSentence } from './cladeSentence.ts';

const row = (label: string, change = {}) => ({ label, pAdjusted: 0.5, testable: true, holds: false, ...change });
const told = (clades: readonly ReturnType<typeof row>[], minTips: number | null = 3) =>
	cladeSentence({ clades, test: { minTips }, alpha: 0.05 });

// Expected sentences are written by hand.
describe('cladeSentence', () => {
	it('claims nothing where nothing holds beyond the clade above', () => {
		expect(told([row('a–b'), row('c–d')])).toBe(
			'Of 2 clades of at least 3 species, none is more alike inside than with the rest of the clade that contains it.'
		);
	});

	it('names what holds, and parts it from what is alike for the sake of a larger clade', () => {
		const clades = [
			row('a–b', { holds: true, pAdjusted: 0.01 }),
			row('c–d', { pAdjusted: 0.01 }),
			row('e–f', { testable: false })
		];
		expect(told(clades)).toBe(
			'Of 3 clades of at least 3 species, 1 is more alike inside than with the other species, and than with the rest of the clade that contains it: a–b. ' +
				'1 more differs from all other species, but not shown beyond the clade that contains it. ' +
				'1 could not have a small p, whatever the data: too few species.'
		);
	});

	it('says that clades were declared, and counts the names beyond four', () => {
		const clades = [...'abcdef'].map((name) => row(name, { holds: true, pAdjusted: 0.01 }));
		expect(told(clades, null)).toContain('Of 6 declared clades, 6 are more alike');
		expect(told(clades, null)).toContain(': a, b, c, d and 2 more.');
	});

	it('is cautioned about larger clades and about causes', () => {
		expect(CLADE_CAUTION).toContain('for the sake of the larger one');
		expect(CLADE_CAUTION).toContain('says nothing of the cause');
	});
});

describe('sisterSentence', () => {
	it('describes both kinds of pairs and says that it is no further evidence', () => {
		expect(sisterSentence({ cherries: 9, meanCherries: 0.714, others: 316, meanOthers: 0.476 })).toBe(
			'9 pairs of sister species overlap 0.71 on average, the other 316 pairs 0.48. Sisters are the youngest pairs, so this is the relation with age told again and no further evidence.'
		);
		expect(sisterSentence({ cherries: 1, meanCherries: 0.8, others: 5, meanOthers: 0.52 })).toContain(
			'One pair of sister species overlaps 0.80, the other 5 pairs 0.52.'
		);
	});
});
