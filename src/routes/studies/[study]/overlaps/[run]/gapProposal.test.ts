import { describe, expect, it } from 'vitest';
import { gapProposal } from './gapProposal.ts';

const NONE = Number.NaN;
/** c lacks its pairs with a, b and d. */
const matrix = {
	species: ['a', 'b', 'c', 'd'],
	values: Float64Array.of(1, 0.5, NONE, 0.4, 0.5, 1, NONE, 0.3, NONE, NONE, 1, NONE, 0.4, 0.3, NONE, 1)
};

// Expected proposals by hand.
describe('gapProposal', () => {
	it('names the one species that all missing pairs share', () => {
		expect(gapProposal(matrix, matrix.species)).toEqual({ missing: 3, leaveOut: ['c'], isFewest: true, remaining: 3 });
	});

	it('asks nothing when the missing pairs are of species that are not in use', () => {
		expect(gapProposal(matrix, ['d', 'a', 'b'])).toBeNull();
	});

	it('counts each missing pair once', () => {
		expect(gapProposal(matrix, ['a', 'c'])?.missing).toBe(1);
	});
});
