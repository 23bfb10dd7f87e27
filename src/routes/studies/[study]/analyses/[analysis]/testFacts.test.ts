import { describe, expect, it } from 'vitest';
import { exampleTold } from './exampleTold.ts';
import { testFacts } from './testFacts.ts';

const factOf = (told: typeof exampleTold, title: string, term: string) =>
	testFacts(told)
		.find((group) => group.title === title)
		?.facts.find((fact) => fact.term === term)?.fact;

// Expected texts are the numbers of the example, written by hand.
describe('testFacts', () => {
	it('gives every tail of both tests and of both node means', () => {
		expect(factOf(exampleTold, 'Shuffled over the whole tree', 'p, both ways')).toBe('= 0.0032');
		expect(factOf(exampleTold, 'Shuffled within the deepest split', 'p, rises')).toBe('= 0.97');
		expect(factOf(exampleTold, 'Node means, weighted by branching', 'p, falls')).toBe('= 0.010');
		expect(factOf(exampleTold, 'Node means, every pair equal', 'p, falls')).toBe('= 0.012');
	});

	it('writes the interval of a sampled p, and none for an exact one', () => {
		expect(factOf(exampleTold, 'Shuffled over the whole tree', '95 % interval of p')).toBe('0.000600 to 0.00290');
		const exact = { ...exampleTold, permutation: { ...exampleTold.permutation, exact: true, interval: null } };
		expect(factOf(exact, 'Shuffled over the whole tree', '95 % interval of p')).toBe('none: exact');
	});

	it('never shows an ordinary regression p as if it were a test', () => {
		const terms = testFacts(exampleTold)[0]?.facts.map(({ term }) => term);
		expect(terms?.some((term) => /\bp\b/.test(term))).toBe(false);
	});
});
