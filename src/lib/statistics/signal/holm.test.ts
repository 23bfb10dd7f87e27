import { expect, it } from 'vitest';
import { holm } from './holm.ts';

// By R 4.2: p.adjust(c(.01, .04, .03, .005), "holm") gives .03 .06 .06 .02.
it('adjusts step by step, never below an earlier step', () => {
	expect(holm([0.01, 0.04, 0.03, 0.005])).toEqual([0.03, 0.06, 0.06, 0.02].map((p): unknown => expect.closeTo(p, 14)));
	expect(holm([0.9, 0.8])).toEqual([1, 1]);
});
