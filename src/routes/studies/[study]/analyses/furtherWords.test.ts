import { describe, expect, it } from 'vitest';
import { planSchema } from '#lib/contracts/plan.ts';
import { cladeChoiceWords, furtherFacts, furtherWords } from './furtherWords.ts';

// Expected words are written by hand.
describe('furtherWords', () => {
	it('names up to two statistics and counts more, leaving out the one judged by', () => {
		expect(furtherWords([], 'slope')).toBe('nothing else');
		expect(furtherWords(['slope', 'slope'], 'slope')).toBe('nothing else');
		expect(furtherWords(['spearman', 'nodes-plain'], 'slope')).toBe(
			'the rank correlation of all pairs and the slope of node means, every pair equal'
		);
		expect(furtherWords(['spearman', 'nodes-plain', 'nodes-nested'], 'slope')).toBe('3 further statistics');
	});
});

describe('cladeChoiceWords', () => {
	it('reads as the end of a sentence', () => {
		expect(cladeChoiceWords({ clades: '', cladeTips: '3', declared: 'a, b' })).toBe('no clades');
		expect(cladeChoiceWords({ clades: 'all', cladeTips: '5', declared: '' })).toBe('clades of at least 5 species');
		expect(cladeChoiceWords({ clades: 'declared', cladeTips: '3', declared: 'a, b\n\n' })).toBe('1 declared clade');
	});
});

describe('furtherFacts', () => {
	const plan = planSchema.parse({ treeSet: 't', tree: 0, overlapRun: 'o', seed: 1 });

	it('is empty for a plan that asks nothing more', () => {
		expect(furtherFacts(plan)).toEqual([]);
	});

	it('tells further statistics and clades', () => {
		expect(furtherFacts({ ...plan, alsoTest: ['spearman'], clades: { minTips: 3 } })).toEqual([
			{ term: 'Also tested', fact: 'the rank correlation of all pairs' },
			{ term: 'Clades', fact: 'at least 3 species' }
		]);
		expect(furtherFacts({ ...plan, clades: { minTips: 3, declared: [['a', 'b']] } })).toEqual([
			{ term: 'Clades', fact: '1 declared clade' }
		]);
		expect(furtherFacts({ ...plan, covariates: ['a', 'b'] })).toEqual([{ term: 'Allowed for', fact: '2 covariates' }]);
		expect(furtherFacts({ ...plan, signal: { variables: ['warmth', 'rain'] } })).toEqual([
			{ term: 'Signal in', fact: 'warmth and rain' }
		]);
	});
});
