import { describe, expect, it } from 'vitest';
import { pairsOfPlate } from './ageWindow.ts';

describe('pairsOfPlate', () => {
	it('finds where each pair of the worked example meets', () => {
		// (((A:1,B:1):1,C:2):2,D:4) in preorder: root 0, ABC 1, AB 2, A 3, B 4, C 5, D 6; pairs BA, CA, CB, DA, DB, DC.
		const tree = { parent: [-1, 0, 1, 2, 2, 1, 0], age: [4, 2, 1, 0, 0, 0, 0], label: ['', '', '', 'A', 'B', 'C', 'D'] };
		const { ages, nodes } = pairsOfPlate({ tree, overlapLower: [0.8, 0.7, 0.6, 0.4, 0.4, 0.5] });
		expect(Array.from(ages)).toEqual([1, 2, 2, 4, 4, 4]);
		expect(Array.from(nodes)).toEqual([2, 1, 1, 0, 0, 0]);
	});
});
