import { describe, expect, it } from 'vitest';
import { microPlan, MICRO_INPUTS, microResult } from './microResult.fixture.ts';
import { analyse } from './analyse.ts';
import { previewAnalysis } from './previewAnalysis.ts';

describe('alsoTested', () => {
	it('is absent when one statistic is declared, also when it is named twice', () => {
		for (const alsoTest of [[], ['slope' as const]]) {
			const { permutation } = microResult({ alsoTest });
			expect(permutation.also).toBeUndefined();
			expect(permutation.pAdjusted).toBeUndefined();
		}
	});

	// The table of the worked example, 12 rows counted twice: slope and nested node slope each have 2 of 24 as low, and it
	// is the same row, so either is as low in 2 of 24 arrangements. Within ABC | D each has 2 of 6.
	it('charges nothing where the same arrangements are extreme by every statistic', () => {
		const { permutation } = microResult({ alsoTest: ['nodes-nested'] });
		expect(permutation.pAdjusted).toBe(2 / 24);
		expect(permutation.also).toMatchObject([
			{ statistic: 'nodes-nested', p: 2 / 24, pAdjusted: 2 / 24, withinDeepestSplit: { pLess: 2 / 6, exact: true } }
		]);
		expect(permutation.also?.[0]?.observed).toBeCloseTo(-4 / 35, 12);
	});

	// By hand for "rises with age", from the same table: the highest slopes are BDCA 51/5, CDBA 101/10, then three rows
	// of 10; the highest node slopes BDCA 11/140, BDAC 37/560, CDBA 1/16. Observed, both are the lowest: p = 1.
	it('adjusts in the direction the plan asks about', () => {
		const { permutation } = microResult({ alsoTest: ['nodes-nested'], alternative: 'greater' });
		expect(permutation).toMatchObject({ p: 1, pAdjusted: 1 });
		expect(permutation.also?.[0]).toMatchObject({ p: 1, pAdjusted: 1 });
	});

	it('never has an adjusted p below the p itself, nor above their number times it', () => {
		const { permutation } = microResult({ alsoTest: ['spearman', 'nodes-plain', 'slope-log-age', 'nodes-nested'] });
		const rows = [{ p: permutation.p, pAdjusted: permutation.pAdjusted ?? 0 }, ...(permutation.also ?? [])];
		expect(rows).toHaveLength(5);
		for (const { p, pAdjusted } of rows) {
			expect(pAdjusted).toBeGreaterThanOrEqual(p);
			expect(pAdjusted).toBeLessThanOrEqual(Math.min(1, 5 * p));
		}
	});

	it('refuses the logarithm of an age that is 0 before anything runs', () => {
		const inputs = { ...MICRO_INPUTS, treeText: '(((A:0,B:0):2,C:2):2,D:4);' };
		const plan = microPlan({ alsoTest: ['slope-log-age'] });
		expect(() => previewAnalysis(inputs, plan)).toThrow('needs every common ancestor older than 0');
		expect(() => analyse(inputs, plan)).toThrow('needs every common ancestor older than 0');
	});
});
