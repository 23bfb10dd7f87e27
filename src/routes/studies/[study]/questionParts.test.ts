import { describe, expect, it } from 'vitest';
import { questionParts, type QuestionFacts } from './questionParts.ts';

const empty: QuestionFacts = { study: 's1', sharedSpecies: null, measure: null, trees: null, alternative: 'less' };
const textOf = (facts: QuestionFacts) =>
	questionParts(facts)
		.map((part) => part.text)
		.join('');

// The expected sentences are written by hand.
describe('questionParts', () => {
	it('asks in general before there are materials', () => {
		expect(textOf(empty)).toBe('Does niche overlap fall with the age of the most recent common ancestor?');
	});

	it('says what is compared once it is known', () => {
		const facts = {
			...empty,
			sharedSpecies: 26,
			measure: 'schoener-d',
			trees: { label: 'Summary tree', treeCount: 1, tree: 0 }
		} as const;
		expect(textOf(facts)).toBe(
			'Across 26 shared species, does Schoener’s D fall with the age of the most recent common ancestor on the summary tree?'
		);
	});

	it('leads each choice to the page where it is made', () => {
		const facts = {
			...empty,
			sharedSpecies: 26,
			measure: 'schoener-d',
			trees: { label: 'Sample', treeCount: 200, tree: 'all' }
		} as const;
		expect(questionParts(facts).flatMap((part) => part.href ?? [])).toEqual([
			'/studies/s1/names',
			'/studies/s1/overlaps',
			'/studies/s1/materials'
		]);
	});

	it('names the tree as the plan does, by its label, and one of several by its number', () => {
		const on = (trees: QuestionFacts['trees']) => textOf({ ...empty, measure: 'schoener-d', trees });
		expect(on({ label: 'Dated tree', treeCount: 1, tree: 'all' })).toContain(' on the dated tree?');
		expect(on({ label: 'Sample', treeCount: 1200, tree: 'all' })).toContain(' on all 1,200 trees of “Sample”?');
		expect(on({ label: 'Sample', treeCount: 1200, tree: 7 })).toContain(' on tree 7 of “Sample”?');
	});

	it('keeps the direction that was asked', () => {
		expect(textOf({ ...empty, alternative: 'greater' })).toContain('niche overlap rise with');
	});
});
