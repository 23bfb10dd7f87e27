import { expect, it } from 'vitest';
import { readNicheTable } from '#lib/overlap/readNicheTable.ts';
import { nicheFactWords } from './nicheWords.ts';

it('names the variables and what they tell', () => {
	const { variables } = readNicheTable('species,warmth,warmth_se,records\nA,1,.1,30\nB,2,.1,20\n');
	expect(nicheFactWords(variables)).toEqual(['warmth (with standard errors)', 'records (number of records)']);
});
