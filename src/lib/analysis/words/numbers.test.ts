import { describe, expect, it } from 'vitest';
import { formatAge, formatCount, formatP, formatShare, formatSlope } from './numbers.ts';

// Expected texts by hand from the rounding rules: slopes three significant digits, p two, true minus.
describe('formatSlope', () => {
	it.each([
		[-0.0163241, '−0.0163'],
		[0.5, '0.500'],
		[-6.2051109e-5, '−6.21 × 10⁻⁵'],
		[12.3456, '12.3'],
		[1234.5, '1230'],
		[0, '0']
	])('writes %d as %s', (value, text) => {
		expect(formatSlope(value)).toBe(text);
	});
});

describe('formatP', () => {
	it('keeps two significant digits', () => {
		expect(formatP(0.0015999, 1e-4)).toBe('= 0.0016');
		expect(formatP(0.3431, 1e-5)).toBe('= 0.34');
		expect(formatP(1, 1e-5)).toBe('= 1');
	});

	it('says at most at the floor of a Monte Carlo test only', () => {
		expect(formatP(1e-5, 1e-5)).toBe('≤ 0.00001');
		expect(formatP(1 / 12, null)).toBe('= 0.083');
	});
});

describe('formatCount, formatShare and formatAge', () => {
	it('group thousands, keep one decimal where it tells something, and follow the age of the root', () => {
		expect(formatCount(99_999)).toBe('99,999');
		expect(formatCount(999)).toBe('999');
		expect(formatShare(0.214)).toBe('21 %');
		expect(formatShare(0.034)).toBe('3.4 %');
		expect(formatAge(3.14159, 18.4)).toBe('3.1');
		expect(formatAge(3.14159, 8)).toBe('3.14');
	});
});
