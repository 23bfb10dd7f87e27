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

	it('reads one species a line, each once, blank lines aside', () => {
		expect(planForm.parse({ ...values, species: 'Rana alba\r\n\n Rana nigra \nRana alba' }).species).toEqual([
			'Rana alba',
			'Rana nigra'
		]);
	});

	it.each([
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
		expect(parsed.error?.issues[0]?.path).toEqual([field]);
		expect(parsed.error?.issues[0]?.message).toMatch(/[.]$/);
	});
});

describe('planValues', () => {
	// By property: writing a plan into the form and reading it back gives the same plan.
	it('is undone by reading the form', () => {
		const plan = planSchema.parse({ ...planForm.parse({ ...values, species: 'a\nb\nc\nd', transform: 'logit' }), tree: 3 });
		expect(planSchema.parse(planForm.parse(planValues(plan)))).toEqual(plan);
	});
});
