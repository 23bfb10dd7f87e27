import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from './exampleTrees.ts';
import { linearRegression } from './linearRegression.ts';
import { mantel } from './mantel.ts';
import { nodeAverages } from './nodeAverages.ts';
import { lowerTriangle, symmetricMatrix } from './pairValues.ts';
import { type PermutationDesign, type PermutationStatistic, preparePermutation } from './permutationDesign.ts';
import { randomStream } from './randomStream.ts';

const observed = (design: PermutationDesign, statistic: PermutationStatistic) =>
	design.functionals.find((functional) => functional.statistic === statistic)?.observed;

const codeOf = (run: () => unknown) => {
	try {
		run();
	} catch (error) {
		if (error instanceof InputError) return error.code;
		throw error;
	}
	return 'none';
};

describe('preparePermutation', () => {
	it('observes what the plain formulas give', () => {
		for (let seed = 0; seed < 20; seed++) {
			const stream = randomStream(seed, 0, 8);
			const n = 4 + seed;
			const tree = drawnTree(n, stream, { polytomies: seed % 2 === 1 });
			const overlap = drawnOverlap(n, stream);
			const ages = lowerTriangle(pairAgeMatrix(tree), n);
			const overlaps = lowerTriangle(overlap, n);
			const design = preparePermutation({ tree, overlap });
			const averages = nodeAverages(tree, overlap);
			expect(observed(design, 'slope')).toBeCloseTo(linearRegression(ages, overlaps).slope, 12);
			expect(observed(design, 'slope-log-age')).toBeCloseTo(linearRegression(ages.map(Math.log2), overlaps).slope, 12);
			expect(observed(design, 'spearman')).toBeCloseTo(mantel(ages, overlaps).spearman, 12);
			expect(observed(design, 'nodes-plain')).toBeCloseTo(averages.plain.slope, 12);
			expect(observed(design, 'nodes-nested')).toBeCloseTo(averages.nested.slope, 12);
		}
	});

	// By hand: sides of 3 and 2; 6 of 10 pairs meet at the root.
	it('tells the sides of the root and the share of pairs that meet there', () => {
		const tree = exampleTree('((A:1,(B:0.5,C:0.5):0.5):2,(D:2,E:2):1);');
		const design = preparePermutation({ tree, overlap: drawnOverlap(5, randomStream(1, 0, 8)) });
		expect(design.sides).toEqual([3, 2]);
		expect(design.rootPairShare).toBe(0.6);
		expect(design.within).toEqual([
			{ from: 0, to: 3 },
			{ from: 3, to: 5 }
		]);
	});

	it('leaves a side of one species alone', () => {
		const tree = exampleTree('((A:1,B:1):2,C:3);');
		expect(preparePermutation({ tree, overlap: drawnOverlap(3, randomStream(1, 0, 8)) }).within).toEqual([{ from: 0, to: 2 }]);
	});

	it('has no slope on log age where two species part at age 0', () => {
		const tree = exampleTree('((A:0,B:0):3,C:3);');
		const design = preparePermutation({ tree, overlap: drawnOverlap(3, randomStream(1, 0, 8)) });
		expect(design.functionals.map(({ statistic }) => statistic)).not.toContain('slope-log-age');
	});

	it('refuses what no test can be made of', () => {
		const three = exampleTree('((A:1,B:1):2,C:3);');
		const random = drawnOverlap(3, randomStream(1, 0, 8));
		expect(codeOf(() => preparePermutation({ tree: exampleTree('(A:1,B:1,C:1);'), overlap: random }))).toBe('constant-ages');
		expect(codeOf(() => preparePermutation({ tree: three, overlap: symmetricMatrix([0.4, 0.4, 0.4], 3, 1) }))).toBe(
			'constant-overlap'
		);
		expect(codeOf(() => preparePermutation({ tree: three, overlap: symmetricMatrix([0.4, NaN, 0.3], 3, 1) }))).toBe('non-finite');
		const two = { tree: exampleTree('(A:1,B:1);'), overlap: Float64Array.of(1, 0.5, 0.5, 1) };
		expect(codeOf(() => preparePermutation(two))).toBe('too-few-species');
		const ageless = { parent: three.parent, ages: three.ages.map((age, node) => (node === 1 ? NaN : age)) };
		expect(codeOf(() => preparePermutation({ tree: ageless, overlap: random }))).toBe('non-finite');
	});
});
