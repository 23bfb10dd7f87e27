import { describe, expect, it } from 'vitest';
import { identityArrangement } from '../arrangements.ts';
import { exampleTree } from '../exampleTrees.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { gatherTrees } from './gatherTrees.ts';
import { lnInterchangeable } from './interchangeable.ts';

const together = (length: number) => new Int32Array(length);

describe('lnInterchangeable', () => {
	// By hand: rows 0 and 1 have weight 5 with each other and 2, 3 with the others; 2 and 3 differ.
	it('counts the orders of species whose weights with all others are the same', () => {
		const weights = symmetricMatrix([5, 2, 2, 3, 3, 4], 4, 0);
		expect(lnInterchangeable(weights, together(4))).toBeCloseTo(Math.log(2), 14);
		expect(lnInterchangeable(symmetricMatrix([1, 1, 1, 1, 1, 1], 4, 0), together(4))).toBeCloseTo(Math.log(24), 14);
		expect(lnInterchangeable(symmetricMatrix([1, 2, 3, 4, 5, 6], 4, 0), together(4))).toBe(0);
	});

	it('exchanges no species across sides', () => {
		const weights = symmetricMatrix([1, 1, 1, 1, 1, 1], 4, 0);
		expect(lnInterchangeable(weights, Int32Array.of(0, 0, 1, 1))).toBeCloseTo(Math.log(4), 14);
	});

	// By hand: both trees hold the cherry AB; the second takes C and D for sisters, the first does not.
	it('finds the cherries that all trees hold', () => {
		const trees = ['(((A:1,B:1):1,C:2):2,D:4);', '((A:3,B:3):1,(C:2,D:2):2);'].map((newick) => ({
			...exampleTree(newick),
			rows: identityArrangement(4)
		}));
		const [first] = trees;
		if (first === undefined) throw new Error('There are two trees.');
		const { averaged } = gatherTrees({
			trees,
			displayed: first,
			overlap: symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1),
			tipCount: 4,
			statistics: ['slope'],
			nameOf: String
		});
		expect(lnInterchangeable(averaged[0]?.weights ?? new Float64Array(0), together(4))).toBeCloseTo(Math.log(2), 14);
	});
});
