import { describe, expect, it } from 'vitest';
import { cladeSpecies } from './cladeSpecies.ts';

// By hand: ((a,b),(c,(d,e))) in preorder.
const tree = {
	parent: [-1, 0, 1, 1, 0, 4, 4, 6, 6],
	label: ['', '', 'a', 'b', '', 'c', '', 'd', 'e']
};

describe('cladeSpecies', () => {
	it('lists the tips below a node', () => {
		expect(cladeSpecies(tree, 4)).toEqual(['c', 'd', 'e']);
		expect(cladeSpecies(tree, 0)).toEqual(['a', 'b', 'c', 'd', 'e']);
		expect(cladeSpecies(tree, 2)).toEqual(['a']);
	});

	it('lists nothing for a node that is not there', () => {
		expect(cladeSpecies(tree, 99)).toEqual([]);
		expect(cladeSpecies(tree, Number.NaN)).toEqual([]);
	});
});
