import { describe, expect, it } from 'vitest';
import { overlapsOfAge } from './overlapsOfAge.ts';

// The worked example: AB .8 at node 2; AC .7, BC .6 at node 1; AD .4, BD .4, CD .5 at the root, node 0.
const micro = { ages: [1, 2, 2, 4, 4, 4], overlaps: [0.8, 0.7, 0.6, 0.4, 0.4, 0.5], nodes: [2, 1, 1, 0, 0, 0] };

describe('overlapsOfAge', () => {
	it('counts the pairs and the nodes of a window, ends included', () => {
		expect(overlapsOfAge(micro, 2, 4)).toEqual({ pairs: 5, nodes: 2, range: { lowest: 0.4, highest: 0.7 } });
		expect(overlapsOfAge(micro, 1, 1)).toEqual({ pairs: 1, nodes: 1, range: { lowest: 0.8, highest: 0.8 } });
	});

	it('knows of no overlap where no pair is so old', () => {
		expect(overlapsOfAge(micro, 2.5, 3.9)).toEqual({ pairs: 0, nodes: 0, range: null });
	});

	it.each([
		[3, 2],
		[-1, 2],
		[0, Number.NaN],
		[0, Number.POSITIVE_INFINITY]
	])('refuses %d to %d as a window', (from, to) => {
		expect(() => overlapsOfAge(micro, from, to)).toThrow('Expected two ages, the younger first');
	});
});
