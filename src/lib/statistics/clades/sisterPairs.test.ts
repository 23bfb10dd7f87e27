import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { exampleTree } from '../exampleTrees.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { sisterPairs } from './sisterPairs.ts';

describe('sisterPairs', () => {
	// By hand: AB .8 and CD .5 are sisters; AC .7, BC .6, AD .4, BD .4 are not: means .65 and .525.
	it('parts the pairs of sister species from the rest', () => {
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		const found = sisterPairs(treeShape(exampleTree('((A:1,B:1):2,(C:2,D:2):1);')), overlap);
		expect(found).toMatchObject({ cherries: 2, others: 4 });
		expect(found.meanCherries).toBeCloseTo(0.65, 14);
		expect(found.meanOthers).toBeCloseTo(0.525, 14);
	});

	it('counts no sisters where three part at once', () => {
		const shape = treeShape(exampleTree('((A:1,B:1,C:1):2,D:3);'));
		const found = sisterPairs(shape, symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1));
		expect(found).toMatchObject({ cherries: 0, meanCherries: null, others: 6 });
	});
});
