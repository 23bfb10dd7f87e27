import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ascendingOrder } from './ascendingOrder.ts';

describe('ascendingOrder', () => {
	// By hand.
	it('keeps equal values, 0 and −0 among them, in the order given', () => {
		expect([...ascendingOrder([2, 0, -1, -0, 2, -1e300])]).toEqual([5, 2, 1, 3, 0, 4]);
		expect([...ascendingOrder([])]).toEqual([]);
		expect([...ascendingOrder([7, 7, 7])]).toEqual([0, 1, 2]);
	});

	// Property: a stable sort by comparison gives the same order, for numbers of every magnitude.
	it('agrees with a sort by comparison', () => {
		const finite = fc.oneof(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.integer({ min: -3, max: 3 }));
		fc.assert(
			fc.property(fc.array(finite, { maxLength: 300 }), (values) => {
				const compared = values.map((_, index) => index).sort((a, b) => (values[a] ?? 0) - (values[b] ?? 0));
				expect([...ascendingOrder(values)]).toEqual(compared);
			})
		);
	});
});
