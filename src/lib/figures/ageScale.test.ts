import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ageScale, ageSpacing, ageTicks } from './ageScale.ts';

describe('ageSpacing', () => {
	it('is linear for nodes spread over the whole age', () => {
		expect(ageSpacing([1, 2, 3, 4, 5, 6, 7, 8, 9, 10], 10)).toEqual({ kind: 'linear' });
	});

	// By hand: the middle 80 % lies between 1.4 and 4.6 or so of 100; the median is 3.
	it('is logarithmic about the median when the middle nodes are crowded', () => {
		expect(ageSpacing([1, 2, 3, 4, 100], 100)).toEqual({ kind: 'linear' }); // 90 % quantile 61.6, by hand 4 + 0.6 × 96
		expect(ageSpacing([1, 1, 2, 2, 3, 3, 4, 4, 5, 5, 100], 100)).toEqual({ kind: 'log', constant: 3 });
	});

	it('stays linear when the median node has age 0, which leaves nothing to divide by', () => {
		expect(ageSpacing([0, 0, 0, 0, 0, 0, 0, 0, 1, 10], 10)).toEqual({ kind: 'linear' });
	});
});

describe('ageScale', () => {
	// By the formula: log(1 + 3/1) is half of log(1 + 15/1), since 16 = 4².
	it('places ages by log(1 + age / a)', () => {
		const scale = ageScale({ kind: 'log', constant: 1 }, 15, [0, 100]);
		expect(scale(0)).toBe(0);
		expect(scale(3)).toBeCloseTo(50, 10);
		expect(scale(15)).toBeCloseTo(100, 10);
	});

	it('runs either way and is undone by its inverse', () => {
		fc.assert(
			fc.property(fc.double({ min: 0, max: 20, noNaN: true }), fc.boolean(), (age, turned) => {
				const scale = ageScale({ kind: 'log', constant: 2 }, 20, turned ? [300, 10] : [10, 300]);
				expect(scale.invert(scale(age))).toBeCloseTo(age, 8);
			})
		);
	});
});

describe('ageTicks', () => {
	it('marks round ages of a linear axis, the present among them', () => {
		const spacing = { kind: 'linear' } as const;
		expect(ageTicks(ageScale(spacing, 18.4, [0, 400]), spacing, 60)).toEqual([0, 5, 10, 15]);
	});

	it('marks round ages of a logarithmic axis that stay apart', () => {
		const spacing = { kind: 'log', constant: 1 } as const;
		const scale = ageScale(spacing, 100, [0, 400]);
		const ticks = ageTicks(scale, spacing, 40);
		expect(ticks[0]).toBe(0);
		expect(ticks).toContain(100);
		for (const [k, age] of ticks.entries()) {
			if (k > 0) expect(scale(age) - scale(ticks[k - 1] ?? 0)).toBeGreaterThanOrEqual(40);
			if (age > 0) expect([1, 2, 5]).toContain(Number(age.toExponential()[0]));
		}
	});
});
