import { describe, expect, it } from 'vitest';
import { midRanks, midRanksOfRepeated } from './midRanks.ts';

describe('midRanks', () => {
	// By hand.
	it('gives tied values the mean of their ranks', () => {
		expect([...midRanks([3, 1, 3, 2, 3])]).toEqual([4, 1, 4, 2, 4]);
	});

	// By hand: 0.1 + 0.2 is 0.30000000000000004.
	it('ties values that differ by rounding only', () => {
		expect([...midRanks([0.1 + 0.2, 0.3, 0.30001])]).toEqual([1.5, 1.5, 3]);
	});

	it('does not depend on the unit', () => {
		const values = [0.1 + 0.2, 0.3, 0.5, 0.1];
		expect([...midRanks(values.map((v) => v * 1e6))]).toEqual([...midRanks(values)]);
	});

	it('names the value that is not finite', () => {
		expect(() => midRanks([1, Number.NaN])).toThrow('Expected value 2 to be a finite number; got NaN.');
	});
});

describe('midRanksOfRepeated', () => {
	it('gives the ranks of the copies written out', () => {
		// By hand: 5, 2, 2, 2, 5, 5, 7 have ranks 5, 2, 2, 2, 5, 5, 7.
		expect([...midRanksOfRepeated([5, 2, 5, 7], [1, 3, 2, 1])]).toEqual([5, 2, 5, 7]);
	});
});
