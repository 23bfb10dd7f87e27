import { describe, expect, it } from 'vitest';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import { analysisResultSchema } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { remark } from '#lib/remarks/remark.ts';
import { analyse } from './analyse.ts';
import { MICRO_INPUTS, microPlan, microResult } from './microResult.fixture.ts';
import { previewAnalysis } from './previewAnalysis.ts';

// Eight species on a made tree with two-decimal overlaps: small enough to read, large enough to shuffle.
const EIGHT: AnalysisInputs = {
	...MICRO_INPUTS,
	treeText: '(((a:1,b:1):2,(c:2,d:2):1):4,((e:1.5,f:1.5):3,(g:4,h:4):0.5):2.5);',
	overlap: {
		species: ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h'],
		lower: Float64Array.from({ length: 28 }, (_, i) => ((i * 37 + 11) % 89) / 100),
		remarks: []
	}
};

function refusal(change: Partial<AnalysisInputs>, plan = microPlan()): string {
	try {
		analyse({ ...MICRO_INPUTS, ...change }, plan);
	} catch (thrown) {
		if (thrown instanceof InputError) return `${thrown.code}: ${thrown.message}`;
		throw thrown;
	}
	return 'not refused';
}

describe('analyse, on four species worked by hand', () => {
	// Exact fractions of the worked example: slope −31/265, intercept 238/265, 2 of 24, 2 of 6 within the split, z 43/5.
	it('gives regression, Mantel and exact p', () => {
		const { regression, mantel, permutation } = microResult();
		expect(regression.slope).toBeCloseTo(-31 / 265, 14);
		expect(regression.intercept).toBeCloseTo(238 / 265, 14);
		expect(mantel.z).toBeCloseTo(8.6, 14);
		expect(mantel.spearman).toBeCloseTo(-15 / Math.sqrt(255), 14);
		expect(permutation).toMatchObject({
			exact: true,
			count: 24,
			asExtreme: 2,
			interval: null,
			monteCarloStandardError: 0,
			distinctAges: 3
		});
		expect(permutation.p).toBe(2 / 24);
		expect(permutation.pTwoSided).toBe(4 / 24);
		expect(permutation.moments.mean).toBeCloseTo(289 / 30, 12);
		expect(permutation.moments.variance).toBeCloseTo(71 / 225, 12);
	});

	it('gives p within the deepest split and the smallest attainable p', () => {
		const { permutation, finding } = microResult();
		expect(permutation.withinDeepestSplit).toMatchObject({ exact: true, count: 6, sides: [3, 1], rootPairShare: 0.5 });
		expect(permutation.withinDeepestSplit?.pLess).toBeCloseTo(2 / 6, 14);
		// A caterpillar of four: 2/4! relabellings leave the ages as they are.
		expect(permutation.smallestP).toBeCloseTo(2 / 24, 14);
		expect(permutation.withinDeepestSplit?.smallestP).toBeCloseTo(2 / 6, 14);
		expect(finding.kind).toBe('too-few');
	});

	it('gives node averages both ways', () => {
		const { nested, plain, nodes } = microResult().nodeAverages;
		expect(nested.slope).toBeCloseTo(-4 / 35, 14);
		expect(nested.intercept).toBeCloseTo(0.9, 14);
		expect(plain.slope).toBeCloseTo(-101 / 840, 14);
		expect(nodes.map(({ pairs }) => pairs)).toEqual([3, 2, 1]);
		expect(nodes[0]?.children).toEqual([['A', 'B', 'C'], ['D']]);
	});

	it('keeps to its contract, whose numbers are never NaN', () => {
		const result = microResult();
		expect(analysisResultSchema.parse(result)).toEqual(result);
	});
});

describe('analyse, in general', () => {
	const plan = microPlan({ permutations: 999, seed: 7 });

	it('gives equal bits for equal plans, whatever is told on the way', () => {
		expect(analyse(EIGHT, plan, () => undefined)).toEqual(analyse(EIGHT, plan));
	});

	it('does not depend on the order of species in the matrix', () => {
		const order = [5, 2, 7, 0, 6, 1, 4, 3];
		const value = (i: number, j: number) =>
			EIGHT.overlap.lower[(Math.max(i, j) * (Math.max(i, j) - 1)) / 2 + Math.min(i, j)] ?? NaN;
		const lower = order.flatMap((a, i) => order.slice(0, i).map((b) => value(a, b)));
		const species = order.map((index) => EIGHT.overlap.species[index] ?? '');
		const turned = { ...EIGHT, overlap: { species, lower: Float64Array.from(lower), remarks: [] } };
		expect(analyse(turned, plan)).toEqual(analyse(EIGHT, plan));
	});

	it('scales the slope with the unit of age and leaves p', () => {
		const doubled = { ...EIGHT, treeText: EIGHT.treeText.replace(/:([\d.]+)/g, (_, length) => `:${Number(length) * 2}`) };
		const [one, two] = [analyse(EIGHT, plan), analyse(doubled, plan)];
		expect(two.regression.slope).toBeCloseTo(one.regression.slope / 2, 14);
		expect(two.permutation.p).toBe(one.permutation.p);
	});

	it('uses the species a plan names and lists the others', () => {
		const result = analyse(EIGHT, microPlan({ species: ['a', 'b', 'c', 'e', 'g'] }));
		expect(result.plate.species).toEqual(['a', 'b', 'c', 'e', 'g']);
		expect(result.dropped.map(({ name, why }) => `${name}: ${why}`)).toEqual(
			['d', 'f', 'h'].map((name) => `${name}: not named in the plan`)
		);
	});

	it('puts overlaps on the logit scale when the plan says so', () => {
		const result = analyse(EIGHT, microPlan({ transform: 'logit' }));
		expect(result.compared.transform).toBe('logit');
		expect(result.finding.limits.join(' ')).toContain('logit scale');
	});

	it('reports progress up to the last arrangement', () => {
		const told: AnalysisProgress[] = [];
		analyse(EIGHT, plan, (progress) => told.push(progress));
		const last = told.at(-1);
		expect(last?.done).toBe(last?.total);
		expect(told[0]?.newSlopes.length).toBeGreaterThan(0);
		expect(last?.p).toBeCloseTo(analyse(EIGHT, plan).permutation.p, 3);
	});

	it('agrees with its preview on species, attainable p and exactness', () => {
		const preview = previewAnalysis(EIGHT, plan);
		const result = analyse(EIGHT, plan);
		expect(preview.species).toEqual(result.plate.species);
		expect(preview.smallestP).toBe(result.permutation.smallestP);
		expect(preview.exact).toBe(result.permutation.exact);
		expect(preview.sides).toEqual(result.permutation.withinDeepestSplit?.sides);
	});
});

describe('analyse, on materials that do not allow it', () => {
	it('says that there is no such tree', () => {
		expect(refusal({}, microPlan({ tree: 3 }))).toBe(
			'no-such-tree: The tree set holds 1 tree, counted from 0; there is no tree 3.'
		);
	});

	it('waits for a spread that needs a decision, and levels the tips once it is made', () => {
		const uneven = { treeText: '(((A:1,B:1):1,C:2):2,D:4.02);' };
		expect(refusal(uneven)).toMatch(/^spread-needs-decision: .*Confirm that all species live now/);
		const result = analyse({ ...MICRO_INPUTS, ...uneven, spreadConfirmed: true }, microPlan());
		expect(result.compared.levelled).toBe(true);
		expect(result.compared.rootAge).toBeCloseTo(4.02, 12);
	});

	it('refuses a tree that is not dated, whatever was confirmed', () => {
		expect(refusal({ treeText: '(((A:1,B:1):1,C:2):2,D:9);', spreadConfirmed: true })).toMatch(/^not-ultrametric: /);
	});

	it('refuses a star, also one that pruning leaves', () => {
		expect(refusal({ treeText: '(A:1,B:1,C:1,D:1);' })).toMatch(/^star-tree: /);
		expect(
			refusal({
				treeText: '(((A:1,X:1):1,(B:1,Y:1):1):1,(C:2,Z:2):1,D:3);',
				overlap: { ...MICRO_INPUTS.overlap, species: ['A', 'B', 'C', 'D'] }
			})
		).toBe('not refused');
		expect(refusal({ treeText: '((A:1,X:1):1,(B:1,Y:1):1,(C:1,Z:1):1,D:2);' })).toBe(
			'star-tree: All pairs of the shared species have the same common ancestor age (a star): nothing can be regressed on age. Bring a resolved tree.'
		);
	});

	it('counts the species that are shared', () => {
		expect(refusal({ treeText: '((A:1,B:1):1,C:2);' })).toBe(
			'too-few-species: Expected at least 4 species shared by tree and matrix; there are 3. Look at the names: 4 must agree.'
		);
	});

	it('names the fewest species to leave out when pairs are missing', () => {
		const lower = Float64Array.from(EIGHT.overlap.lower);
		lower[0] = Number.NaN;
		lower[1] = Number.NaN;
		expect(refusal({ ...EIGHT, overlap: { ...EIGHT.overlap, lower } })).toBe(
			'missing-pairs: 2 pairs have no overlap. An analysis needs every pair: leave out a, or bring the missing values.'
		);
	});

	it('waits for an open remark of the overlap run', () => {
		const open = remark('settle', 'percent-or-fraction', 'Say whether these are percent.');
		expect(refusal({ overlap: { ...MICRO_INPUTS.overlap, remarks: [open] } })).toBe(
			'percent-or-fraction: Say whether these are percent.'
		);
	});

	it('says which species a plan names in vain', () => {
		expect(refusal({}, microPlan({ species: ['A', 'B', 'C', 'Q'] }))).toBe(
			'unknown-species: The plan names species that tree and matrix do not share: Q.'
		);
	});

	it('refuses the logarithm of age 0 and constant overlap with a sentence', () => {
		expect(refusal({ treeText: '(((A:0,B:0):2,C:2):2,D:4);' }, microPlan({ statistic: 'slope-log-age' }))).toMatch(/^age-zero: /);
		expect(refusal({ overlap: { ...MICRO_INPUTS.overlap, lower: new Float64Array(6).fill(0.5) } })).toMatch(
			/^constant-overlap: /
		);
	});
});
