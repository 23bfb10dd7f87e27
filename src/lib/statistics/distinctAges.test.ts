import { describe, expect, it } from 'vitest';
import { distinctAges } from './distinctAges.ts';

describe('distinctAges', () => {
	// By hand.
	it('counts ages that differ by rounding once', () => {
		expect(distinctAges([4, 2, 2.000000001, 1, 4])).toBe(3);
	});

	it('does not depend on the unit', () => {
		expect(distinctAges([4e6, 2e6, 2.000000001e6, 1e6])).toBe(3);
	});

	it('counts nothing in nothing and refuses NaN', () => {
		expect(distinctAges([])).toBe(0);
		expect(() => distinctAges([1, Number.NaN])).toThrow('Expected age 2 to be a finite number; got NaN.');
	});
});
