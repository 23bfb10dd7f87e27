import { describe, expect, it } from 'vitest';
import { clopperPearson } from './clopperPearson.ts';

describe('clopperPearson', () => {
	// By hand: with b = 0 the upper end u solves (1 - u)^m = 2.5%; with b = m the lower end solves l^m = 2.5%.
	it('has its closed forms at the ends', () => {
		expect(clopperPearson(0, 10, 0.95)).toEqual([0, expect.closeTo(1 - 0.025 ** 0.1, 9)]);
		expect(clopperPearson(10, 10, 0.95)).toEqual([expect.closeTo(0.025 ** 0.1, 9), 1]);
	});

	// The interval's definition, by binomial sums: at each end the tail beyond b holds 2.5%.
	it('leaves 2.5% beyond the count at either end', () => {
		const [lower, upper] = clopperPearson(3, 12, 0.95);
		const tail = (p: number, from: number, to: number) => {
			let sum = 0;
			for (let k = from; k <= to; k++) sum += choose(12, k) * p ** k * (1 - p) ** (12 - k);
			return sum;
		};
		expect(tail(lower, 3, 12)).toBeCloseTo(0.025, 9);
		expect(tail(upper, 0, 3)).toBeCloseTo(0.025, 9);
	});

	// Published: 682 of 925 peas, Conover (1971) p. 97 after Mendel; the interval as in R's help page of binom.test
	// (0.7076683, 0.7654066), value from memory.
	it('agrees with a printed interval', () => {
		const [lower, upper] = clopperPearson(682, 925, 0.95);
		expect(lower).toBeCloseTo(0.7076683, 7);
		expect(upper).toBeCloseTo(0.7654066, 7);
	});

	// A p of .05 from 999 shuffles is known to .037-.064, from 9,999 to .046-.054 (b = 49 and 499).
	it('tells how well a p of .05 is known', () => {
		expect(clopperPearson(49, 999, 0.95).map((end) => end.toFixed(3))).toEqual(['0.037', '0.064']);
		expect(clopperPearson(499, 9999, 0.95).map((end) => end.toFixed(3))).toEqual(['0.046', '0.054']);
	});

	it('refuses more successes than trials', () => {
		expect(() => clopperPearson(4, 3, 0.95)).toThrow('0 <= b <= m');
	});
});

function choose(n: number, k: number): number {
	let ways = 1;
	for (let i = 0; i < k; i++) ways = (ways * (n - i)) / (i + 1);
	return ways;
}
