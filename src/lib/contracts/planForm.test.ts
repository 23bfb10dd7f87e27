import { describe, expect, it } from 'vitest';
import { planForm, planValues } from './planForm.ts';
import { planSchema } from './plan.ts';

const values = {
	treeSet: 't',
	tree: '0',
	overlapRun: 'r',
	species: '',
	statistic: 'slope',
	alternative: 'less',
	transform: 'none',
	alpha: '0.05',
	permutations: '99,999',
	seed: '20261'
};

// Expected values are read off the fields by hand.
describe('planForm', () => {
	it('reads a plan from its fields, thousands with or without commas', () => {
		expect(planForm.parse(values)).toMatchObject({ tree: 0, species: 'shared', permutations: 99_999, seed: 20_261, alpha: 0.05 });
	});

	it('reads all trees of a set, or the one that is named', () => {
		const treeOf = (change: object) => planForm.parse({ ...values, ...change }).tree;
		expect(treeOf({ tree: 'all', treeNumber: '7' })).toBe('all');
		expect(treeOf({ tree: 'one', treeNumber: '7' })).toBe(7);
		expect(treeOf({ tree: 'one' })).toBe(0);
		expect(treeOf({ tree: '12', treeNumber: '7' })).toBe(12);
		// Of a set of one tree the page asks nothing, so nothing is sent.
		expect(treeOf({ tree: undefined })).toBe('all');
		expect(planForm.safeParse({ ...values, tree: 'some' }).error?.issues[0]?.message).toContain('counted from 0');
	});

	it('reads one species a line, each once, blank lines aside', () => {
		expect(planForm.parse({ ...values, species: 'Rana alba\r\n\n Rana nigra \nRana alba' }).species).toEqual([
			'Rana alba',
			'Rana nigra'
		]);
	});

	it('reads several statistics a line each, and clades of a size or declared by their species', () => {
		expect(planForm.parse(values)).toMatchObject({ alsoTest: [], clades: null });
		const asked = { ...values, alsoTest: '\nspearman\nnodes-plain', clades: 'all', cladeTips: '5' };
		expect(planForm.parse(asked)).toMatchObject({ alsoTest: ['spearman', 'nodes-plain'], clades: { minTips: 5 } });
		const declared = 'Rana alba, Rana nigra\r\nRana nigra; Rana viridis ,Rana rosea';
		expect(planForm.parse({ ...values, clades: 'declared', declared }).clades).toEqual({
			minTips: 3,
			declared: [
				['Rana alba', 'Rana nigra'],
				['Rana nigra', 'Rana viridis', 'Rana rosea']
			]
		});
	});

	it('refuses declared clades that are none', () => {
		const sentence = (declared: string) =>
			planForm.safeParse({ ...values, clades: 'declared', declared }).error?.issues[0]?.message;
		expect(sentence('')).toContain('Name at least one clade');
		expect(sentence('Rana alba')).toContain('at least 2 species');
	});

	it.each([
		['alsoTest', 'median'],
		['clades', 'some'],
		['cladeTips', '1'],
		['seed', '4294967296'],
		['seed', '-1'],
		['permutations', '0'],
		['permutations', '1,000,001'],
		['alpha', '0'],
		['alpha', '1'],
		['alpha', 'five'],
		['statistic', 'p-hacking'],
		['treeSet', '']
	])('refuses %s of %j with a sentence', (field, text) => {
		const parsed = planForm.safeParse({ ...values, [field]: text });
		expect(parsed.success).toBe(false);
		expect(parsed.error?.issues[0]?.path[0]).toBe(field);
		expect(parsed.error?.issues[0]?.message).toMatch(/[.]$/);
	});
});

describe('planValues', () => {
	// By property: writing a plan into the form and reading it back gives the same plan.
	it('is undone by reading the form', () => {
		const plan = planSchema.parse({ ...planForm.parse({ ...values, species: 'a\nb\nc\nd', transform: 'logit' }), tree: 3 });
		expect(planSchema.parse(planForm.parse(planValues(plan)))).toEqual(plan);
		const clades = { minTips: 4, declared: [['a', 'b', 'c']] };
		const more = planSchema.parse({ ...plan, alsoTest: ['spearman', 'slope'], clades, covariates: ['c', 'd'] });
		expect(planSchema.parse(planForm.parse(planValues(more)))).toEqual(more);
	});
});
