import { describe, expect, it } from 'vitest';
import { mantel } from '#lib/statistics/mantel.ts';
import { type MantelTested, mantelTest } from '#lib/statistics/mantelTest.ts';
import { symmetricMatrix } from '#lib/statistics/pairValues.ts';
import reference from '../../fixtures/reference/mantel.json' with { type: 'json' };

/** The fixtures go down the columns of the lower triangle; a symmetric matrix read by columns of one is rows of the other. */
function matrixOf(byColumns: readonly number[], n: number): Float64Array {
	const values = new Float64Array(n * n);
	let pair = 0;
	for (let j = 0; j < n; j++) {
		for (let i = j + 1; i < n; i++) {
			const value = byColumns[pair++] ?? Number.NaN;
			values[i * n + j] = value;
			values[j * n + i] = value;
		}
	}
	return values;
}

const SHUFFLES = 20_000;

type Stored = { exact: boolean; count_ge: number; count_le: number; p_upper: number; p_lower: number; mc_se_upper: number };

function expectTails(tested: MantelTested, stored: Omit<Stored, 'exact'>, exact: boolean): void {
	if (exact) {
		expect(tested).toMatchObject({
			greater: stored.count_ge,
			less: stored.count_le,
			pGreater: stored.p_upper,
			pLess: stored.p_lower
		});
		return;
	}
	// 4 standard errors of the difference of two Monte Carlo values, and the one count that both add.
	for (const [p, ours] of [
		[stored.p_upper, tested.pGreater],
		[stored.p_lower, tested.pLess]
	] as const) {
		const error = Math.sqrt((p * (1 - p)) / SHUFFLES) + stored.mc_se_upper;
		expect(Math.abs(ours - p)).toBeLessThan(4 * error + 1 / SHUFFLES);
	}
}

// Published matrices (Spielman 1973, Väre et al. 1995) and made ones; statistics and counts computed independently in R and C.
// The stored two-sided value is the share with |r| at least as large, another definition than ours: not compared.
describe.each(reference.mantel)('the Mantel test of $name', ({ n, x_lower, y_lower, pearson, spearman }) => {
	const x = matrixOf(x_lower, n);
	const y = matrixOf(y_lower, n);
	const test = mantelTest(x, y, { permutations: SHUFFLES, seed: 1 });

	it('has the reference statistics', () => {
		const { r, spearman: rank } = mantel(x_lower, y_lower);
		expect(r).toBeCloseTo(pearson.statistic, 13);
		expect(rank).toBeCloseTo(spearman.statistic, 13);
		expect(test.pearson.statistic).toBeCloseTo(pearson.statistic, 13);
		expect(test.spearman.statistic).toBeCloseTo(spearman.statistic, 13);
	});

	it('has the reference tails', () => {
		expect(test.exact).toBe(pearson.method.startsWith('exact'));
		expectTails(test.pearson, pearson, test.exact);
		expectTails(test.spearman, spearman, test.exact);
	});
});

describe('matrices without variation', () => {
	it('are refused, and so is a single pair', () => {
		const flat = symmetricMatrix([1, 1, 1, 1, 1, 1], 4, 0);
		const other = symmetricMatrix([1, 2, 3, 4, 5, 6], 4, 0);
		expect(() => mantelTest(flat, other, { permutations: 9, seed: 1 })).toThrow('Expected ages that differ');
		expect(() => mantel([1], [0.5])).toThrow('Expected at least 2 points');
	});
});
