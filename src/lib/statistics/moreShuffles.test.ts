import { describe, expect, it } from 'vitest';
import { clopperPearson } from './clopperPearson.ts';
import { moreShuffles } from './moreShuffles.ts';

const drawn = (asExtreme: number, count: number) => ({
	exact: false,
	count,
	asExtreme,
	interval: clopperPearson(asExtreme, count, 0.95)
});

describe('moreShuffles', () => {
	it('proposes the next step where no shuffle was as extreme', () => {
		expect(moreShuffles(drawn(0, 999), 0.05)).toBe(9_999);
		expect(moreShuffles(drawn(0, 5_000), 0.05)).toBe(9_999);
		expect(moreShuffles(drawn(0, 99_999), 0.05)).toBe(999_999);
	});

	// The 95 % interval of 50 in 999 is 0.037 to 0.065 (methods: p = .05 with m = 999 has .037-.064); of 5 in 999 it ends at 0.0117.
	it('proposes the next step where the interval holds alpha, and nothing where it does not', () => {
		expect(moreShuffles(drawn(50, 999), 0.05)).toBe(9_999);
		expect(moreShuffles(drawn(5, 999), 0.05)).toBeNull();
		expect(moreShuffles(drawn(5, 999), 0.01)).toBe(9_999);
	});

	it('proposes nothing beyond a million, and nothing to an exact test', () => {
		expect(moreShuffles(drawn(0, 999_999), 0.05)).toBeNull();
		expect(moreShuffles(drawn(50_000, 1_000_000), 0.05)).toBeNull();
		expect(moreShuffles({ exact: true, count: 24, asExtreme: 2, interval: null }, 0.05)).toBeNull();
	});
});
