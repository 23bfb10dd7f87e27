import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { analyse } from '#lib/analysis/analyse.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import { readMatrix } from '#lib/overlap/readMatrix.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';

// Expected values: fixtures/real-meadow/expected.json, computed in R from published cover classes and ages (see its README).
const folder = 'fixtures/real-meadow';
const expected = JSON.parse(readFileSync(`${folder}/expected.json`, 'utf8')).D;
const SHUFFLES = 99_999;

function meadowInputs(): AnalysisInputs {
	const { matrix, remarks } = readMatrix(readFileSync(`${folder}/meadow-overlap-d.csv`, 'utf8'), { measure: 'schoener-d' });
	return {
		treeText: readFileSync(`${folder}/meadow-tree.nwk`, 'utf8'),
		ageUnit: 'Ma',
		spreadConfirmed: false,
		measure: 'schoener-d',
		overlap: { species: matrix.species, lower: lowerTriangle(matrix.values, matrix.species.length), remarks },
		decisions: []
	};
}

/** Four Monte Carlo standard errors of both p values together. */
function within(p: number): number {
	return 4 * Math.sqrt(p * (1 - p) * (1 / SHUFFLES + 1 / expected.permutations));
}

describe('30 plants of dune meadows, through the whole analysis', () => {
	let result: AnalysisResult;
	beforeAll(() => {
		result = analyse(
			meadowInputs(),
			planSchema.parse({ treeSet: 't', tree: 0, overlapRun: 'o', permutations: SHUFFLES, seed: 20261 })
		);
	});

	it('matches names that differ by underscore and blank and uses all species', () => {
		expect([result.species, result.pairs]).toEqual([expected.species, expected.pairs]);
		expect(result.dropped).toEqual([]);
	});

	it('gives the regression to ten digits', () => {
		const { slope, intercept, r, rSquared, residualStandardDeviation } = result.regression;
		expect(slope / expected.slope).toBeCloseTo(1, 10);
		expect(intercept).toBeCloseTo(expected.intercept, 10);
		expect(r).toBeCloseTo(expected.r, 10);
		expect(rSquared).toBeCloseTo(expected.rSquared, 10);
		expect(residualStandardDeviation).toBeCloseTo(expected.residualStandardDeviation, 10);
	});

	it('gives Mantel z and rank correlation', () => {
		expect(result.mantel.z / expected.z).toBeCloseTo(1, 10);
		expect(result.mantel.spearman).toBeCloseTo(expected.spearman, 10);
	});

	it('gives p, and p within the deepest split, within their Monte Carlo error', () => {
		const { permutation } = result;
		const split = permutation.withinDeepestSplit;
		expect(Math.abs(permutation.pLess - expected.pLess)).toBeLessThan(within(expected.pLess));
		expect(Math.abs(permutation.pGreater - expected.pGreater)).toBeLessThan(within(expected.pGreater));
		expect(split?.sides.toSorted((a, b) => a - b)).toEqual(expected.withinDeepestSplit.sides);
		expect(split?.rootPairShare).toBeCloseTo(expected.withinDeepestSplit.rootPairShare, 10);
		expect(Math.abs((split?.pLess ?? 1) - expected.withinDeepestSplit.pLess)).toBeLessThan(
			within(expected.withinDeepestSplit.pLess)
		);
	});

	it('gives node averages both ways, with their p', () => {
		const { nested, plain, nodes } = result.nodeAverages;
		for (const [ours, theirs] of [
			[nested, expected.nodesNested],
			[plain, expected.nodesPlain]
		] as const) {
			expect(ours.slope / theirs.slope).toBeCloseTo(1, 9);
			expect(ours.intercept).toBeCloseTo(theirs.intercept, 10);
			expect(ours.rSquared).toBeCloseTo(theirs.rSquared, 10);
			expect(Math.abs(ours.pLess - theirs.pLess)).toBeLessThan(within(theirs.pLess));
		}
		const sorted = [...nodes].sort((a, b) => a.age - b.age || a.pairs - b.pairs);
		const theirs = [...expected.nodes].sort(
			(a: { age: number; pairs: number }, b: { age: number; pairs: number }) => a.age - b.age || a.pairs - b.pairs
		);
		for (const [index, node] of theirs.entries()) {
			expect(sorted[index]?.age).toBeCloseTo(node.age, 5);
			expect(sorted[index]?.pairs).toBe(node.pairs);
		}
	});

	it('claims no more than a fall within the two sides of the root', () => {
		expect(result.finding.kind).toBe('within-split-only');
		expect(result.finding.title).toBe('No relation across the whole tree; within the two sides of the root, overlap falls');
		expect(result.finding.cautions.map(({ code }) => code)).toContain('outgroup');
	});
});
