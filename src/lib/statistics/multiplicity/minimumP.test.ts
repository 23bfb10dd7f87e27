import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { permutationPValue } from '../permutationPValue.ts';
import { minimumP, type SharedNull, type Tail } from './minimumP.ts';

const ofFour = (values: readonly number[], tie = 0): SharedNull => ({
	observed: values[0] ?? 0,
	values: Float64Array.from(values),
	tie
});
const exactly = { tail: 'greater', exact: true } as const;

describe('minimumP', () => {
	// By hand, the observed arrangement first. p of A in the four: 1/4 2/4 3/4 1; of B: 2/4 1 3/4 1/4; the smaller of
	// both: 1/4 2/4 3/4 1/4. Two of four are within A's 1/4, three within B's 2/4; of B alone two are.
	it('takes the share of arrangements whose smallest p is as small', () => {
		const { adjusted, minima } = minimumP([ofFour([4, 3, 2, 1]), ofFour([3, 1, 2, 4])], exactly);
		expect(adjusted[0]).toEqual({ p: 1 / 4, pSingleStep: 2 / 4, pStepDown: 2 / 4 });
		expect(adjusted[1]).toEqual({ p: 2 / 4, pSingleStep: 3 / 4, pStepDown: 2 / 4 });
		expect([...minima]).toEqual([1 / 4, 1 / 4, 2 / 4, 3 / 4]);
	});

	// By hand: the observed 5 joins the shuffles 1, 6, 3, so 5 and 6 are as extreme: p = 2/4. A copy adds nothing.
	it('lets the observed arrangement join the shuffles, and charges nothing for a copy', () => {
		const one: SharedNull = { observed: 5, values: Float64Array.of(1, 6, 3), tie: 0 };
		const { adjusted } = minimumP([one, one], { tail: 'greater', exact: false });
		expect(adjusted).toEqual(Array.from({ length: 2 }, () => ({ p: 2 / 4, pSingleStep: 2 / 4, pStepDown: 2 / 4 })));
	});

	// By hand: within 0.1 the values 1 and 1.05 are one, so the observed 1.05 has two as extreme, and so has 1.
	it('counts values within the tolerance as tied, in every arrangement', () => {
		const { adjusted, minima } = minimumP([ofFour([1.05, 1, 0, 0.5], 0.1)], exactly);
		expect(adjusted[0]?.p).toBe(2 / 4);
		expect([...minima]).toEqual([2 / 4, 2 / 4, 3 / 4, 1]);
	});

	const nulls = fc
		.tuple(fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 30 }))
		.chain(([k, m]) =>
			fc.array(fc.array(fc.integer({ min: 0, max: 12 }), { minLength: m + 1, maxLength: m + 1 }), { minLength: k, maxLength: k })
		)
		.map((rows) => rows.map(([observed = 0, ...values]) => ({ observed, values: Float64Array.from(values), tie: 0 })));
	const tails = fc.constantFrom<Tail>('less', 'greater', 'two-sided');

	it('has the p that counting gives, and adjusts it upwards by no more than the number of statistics', () => {
		fc.assert(
			fc.property(nulls, tails, (statistics, tail) => {
				const { adjusted } = minimumP(statistics, { tail, exact: false });
				for (const [k, { p, pSingleStep, pStepDown }] of adjusted.entries()) {
					expect(p).toBeCloseTo(counted(statistics[k] ?? ofFour([0]), tail), 14);
					expect(pStepDown).toBeGreaterThanOrEqual(p);
					expect(pSingleStep).toBeGreaterThanOrEqual(pStepDown);
					expect(pSingleStep).toBeLessThanOrEqual(Math.min(1, statistics.length * p) + 1e-12);
				}
			})
		);
	});

	it('steps down in the order of the p-values', () => {
		fc.assert(
			fc.property(nulls, tails, (statistics, tail) => {
				const ordered = [...minimumP(statistics, { tail, exact: false }).adjusted].sort((a, b) => a.p - b.p);
				for (const [k, { pStepDown }] of ordered.entries()) {
					expect(pStepDown).toBeGreaterThanOrEqual(ordered[k - 1]?.pStepDown ?? 0);
				}
			})
		);
	});

	it('refuses streams that are not one, and numbers that are none', () => {
		expect(() => minimumP([], exactly)).toThrow('needs a statistic');
		expect(() => minimumP([ofFour([1, 2]), ofFour([1])], exactly)).toThrow('Statistic 1 has 1 values where the first has 2.');
		expect(() => minimumP([ofFour([1, Number.NaN])], exactly)).toThrow('Statistic 0 is not finite throughout.');
	});
});

/** By the function that the test of one statistic uses. */
function counted({ observed, values }: SharedNull, tail: Tail): number {
	const less = values.filter((value) => value <= observed).length;
	const greater = values.filter((value) => value >= observed).length;
	const { pLess, pGreater, pTwoSided } = permutationPValue({ less, greater }, values.length, false);
	return { less: pLess, greater: pGreater, 'two-sided': pTwoSided }[tail];
}
