import { describe, expect, it } from 'vitest';
import { exampleTold } from './exampleTold.ts';
import { nodeP, nodeSentence } from './nodeSentence.ts';

const told = {
	...exampleTold,
	nodeAverages: { ...exampleTold.nodeAverages, nodes: new Array<number>(25).fill(0) },
	plate: { nodeSlopeHistogram: { edges: [0, 1], counts: [4999] } }
};

describe('nodeSentence', () => {
	// Written by hand from the numbers of the example.
	it('tells both weightings, that of the histogram first', () => {
		expect(nodeSentence(told)).toBe(
			'One mean for each of 25 nodes, every pair across it equal: the slope of these means is −0.0190 per Myr, p = 0.012. ' +
				'Weighted by branching it is −0.0200, p = 0.010.'
		);
	});

	it('says nothing where no node slope was kept', () => {
		expect(nodeSentence({ ...told, plate: { nodeSlopeHistogram: null } })).toBeNull();
	});
});

describe('nodeP', () => {
	// By hand: the least p of 4,999 shuffles is 1 / 5,000, counted twice when both tails are asked about.
	it('stops at the floor of the test, twice as high for both tails', () => {
		const least = { ...exampleTold.nodeAverages.plain, pLess: 0.0002, pTwoSided: 0.0004 };
		expect(nodeP(least, exampleTold)).toBe('≤ 0.0002');
		const both = { ...exampleTold, compared: { ...exampleTold.compared, alternative: 'two-sided' as const } };
		expect(nodeP(least, both)).toBe('≤ 0.0004');
	});
});
