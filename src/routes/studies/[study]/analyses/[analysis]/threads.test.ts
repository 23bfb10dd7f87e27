import { describe, expect, it } from 'vitest';
import { exampleTold } from './exampleTold.ts';
import { thread } from './threads.ts';

const sources = {
	tree: { label: 'summary tree', textHash: 'abcdef0123456789' },
	run: { label: 'D', textHash: null }
};

// The sentences are written by hand from the numbers of the example: (7 + 1) / (4,999 + 1) = 0.0016.
describe('thread', () => {
	it('pulls p down to the shuffles and the slope', () => {
		const [p, shuffles] = thread('p', exampleTold, sources);
		expect(p).toBe('p = 0.0016: (7 + 1) / (4,999 + 1); the arrangement observed counts as one.');
		expect(shuffles).toBe('7 of 4,999 shuffles drawn from seed 23 fell as steeply, ties included.');
	});

	it('doubles the tail of a two-sided p and adds nothing to an exact one', () => {
		const both = { ...exampleTold, compared: { ...exampleTold.compared, alternative: 'two-sided' as const } };
		expect(thread('p', both, sources)[0]).toContain('2 × (7 + 1)');
		const exact = { ...exampleTold, permutation: { ...exampleTold.permutation, exact: true, count: 40_320, asExtreme: 64 } };
		expect(thread('p', exact, sources)[0]).toContain('64 / 40,320.');
		expect(thread('shuffles', exact, sources)[1]).toBe('Engine 1.0.0.'); // nothing was drawn, so no seed
	});

	it('ends at the texts that were brought, with their checksums', () => {
		expect(thread('slope', exampleTold, sources)).toEqual([
			'Slope −0.016300 per Myr: least squares over 325 pairs, overlap on the age of the common ancestor.',
			'Schoener’s D from “D”.',
			'Ages from “summary tree”, SHA-256 abcdef012345….'
		]);
	});

	it('says why nothing was shuffled within the split', () => {
		const told = { ...exampleTold, permutation: { ...exampleTold.permutation, withinDeepestSplit: null } };
		expect(thread('within', told, sources)).toEqual(['The sides of the root hold too few species to be shuffled.']);
	});
});
