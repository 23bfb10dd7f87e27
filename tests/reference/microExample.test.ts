import { describe, expect, it } from 'vitest';
import { exampleTree } from '#lib/statistics/exampleTrees.ts';
import { linearRegression } from '#lib/statistics/linearRegression.ts';
import { mantel } from '#lib/statistics/mantel.ts';
import { mantelMoments } from '#lib/statistics/mantelMoments.ts';
import { normalTail, pearsonThreeTail } from '#lib/statistics/momentTails.ts';
import { multipleRegression } from '#lib/statistics/multipleRegression.ts';
import { nodeAverages } from '#lib/statistics/nodeAverages.ts';
import { lowerTriangle, symmetricMatrix } from '#lib/statistics/pairValues.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { permutationTest } from '#lib/statistics/permutationTest.ts';
import { enumerate } from '#lib/statistics/runChunks.ts';

/*
 * Four species worked by hand in exact fractions: (((A:1,B:1):1,C:2):2,D:4), overlaps of five cells.
 * Decimals stand for the fractions or for roots of them, to 12 digits.
 */
const tree = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
// Pairs row by row: AB, AC, BC, AD, BD, CD.
const ages = [1, 2, 2, 4, 4, 4];
const geography = [1, 3, 2, 7, 6, 4];
const d = [0.8, 0.7, 0.6, 0.4, 0.4, 0.5];
const i = [0.934241679265, 0.924264068712, 0.861036598508, 0.546410161514, 0.714626436994, 0.70099676751];

const overlapD = symmetricMatrix(d, 4, 1);
const ageMatrix = symmetricMatrix(ages, 4, 0);

/** The matrix as it stands when the species named by the letters stand at the tips A, B, C, D. */
function arranged(letters: string): Float64Array {
	const at = [...letters].map((letter) => 'ABCD'.indexOf(letter));
	return overlapD.map((_, cell) => overlapD[(at[Math.floor(cell / 4)] ?? 0) * 4 + (at[cell % 4] ?? 0)] ?? 0);
}

// perm, z, slope, r, node averages (AB, ABC, root), node slope, node intercept. Swapping the first two letters changes
// nothing, so each row stands for two arrangements.
const table: readonly [string, number, number, number, readonly number[], number, number][] = [
	['ABCD', 43 / 5, -31 / 265, -0.952157431093, [4 / 5, 13 / 20, 9 / 20], -4 / 35, 9 / 10],
	['ACBD', 87 / 10, -28 / 265, -0.860013163568, [7 / 10, 7 / 10, 17 / 40], -11 / 112, 67 / 80],
	['BCAD', 44 / 5, -5 / 53, -0.767868896042, [3 / 5, 3 / 4, 17 / 40], -41 / 560, 61 / 80],
	['ABDC', 48 / 5, -1 / 265, -0.030714755842, [4 / 5, 2 / 5, 23 / 40], -29 / 560, 57 / 80],
	['ACDB', 97 / 10, 2 / 265, 0.061429511683, [7 / 10, 9 / 20, 11 / 20], -1 / 28, 13 / 20],
	['CDAB', 99 / 10, 8 / 265, 0.245718046734, [1 / 2, 11 / 20, 13 / 20], 1 / 20, 9 / 20],
	['ADBC', 10, 11 / 265, 0.337862314259, [2 / 5, 3 / 5, 3 / 5], 2 / 35, 2 / 5],
	['ADCB', 10, 11 / 265, 0.337862314259, [2 / 5, 3 / 5, 3 / 5], 2 / 35, 2 / 5],
	['BCDA', 10, 11 / 265, 0.337862314259, [3 / 5, 9 / 20, 23 / 40], 1 / 560, 43 / 80],
	['BDAC', 10, 11 / 265, 0.337862314259, [2 / 5, 3 / 5, 5 / 8], 37 / 560, 31 / 80],
	['CDBA', 101 / 10, 14 / 265, 0.430006581784, [1 / 2, 1 / 2, 27 / 40], 1 / 16, 33 / 80],
	['BDCA', 51 / 5, 17 / 265, 0.522150849309, [2 / 5, 11 / 20, 13 / 20], 11 / 140, 7 / 20]
];

const distinct = (values: ArrayLike<number>) => new Set(Array.from(values, (value) => value.toFixed(9))).size;

describe('the micro-example', () => {
	it('has the line of D on age', () => {
		const line = linearRegression(ages, d);
		expect(line.slope).toBeCloseTo(-31 / 265, 14);
		expect(line.intercept).toBeCloseTo(238 / 265, 14);
		expect(line.r).toBeCloseTo(-0.952157431093, 12);
		expect(line.rSquared).toBeCloseTo(0.906603773585, 12);
	});

	it('has the line of I on age, with its impossible intercept', () => {
		const line = linearRegression(ages, i);
		expect(line.slope).toBeCloseTo(-0.103187325394, 11);
		expect(line.intercept).toBeCloseTo(1.072626707367, 11);
		expect(line.r).toBeCloseTo(-0.899486966532, 11);
	});

	it('has the Mantel statistics', () => {
		const { z, r, spearman } = mantel(ages, d);
		expect(z).toBeCloseTo(43 / 5, 14);
		expect(r).toBeCloseTo(-0.952157431093, 12);
		expect(spearman).toBeCloseTo(-15 / Math.sqrt(255), 14);
	});

	it('has the node averages of D', () => {
		const { nodes, nested, plain } = nodeAverages(tree, overlapD);
		expect(nodes.map(({ node, age, pairs }) => [node, age, pairs])).toEqual([
			[0, 4, 3],
			[1, 2, 2],
			[2, 1, 1]
		]);
		expect(nodes[0]?.plain).toBeCloseTo(13 / 30, 14);
		expect(nested.slope).toBeCloseTo(-4 / 35, 14);
		expect(nested.intercept).toBeCloseTo(9 / 10, 14);
		expect(nested.rSquared).toBeCloseTo(0.994191625602 ** 2, 11);
		expect(plain.slope).toBeCloseTo(-101 / 840, 14);
		expect(plain.intercept).toBeCloseTo(109 / 120, 14);
	});

	it('has the node averages of I', () => {
		const { nodes, nested } = nodeAverages(tree, symmetricMatrix(i, 4, 1));
		expect(nodes.map(({ nested: mean }) => mean)).toEqual(
			[0.665757533382, 0.89265033361, 0.934241679265].map((mean) => expect.closeTo(mean, 11))
		);
		expect(nested.slope).toBeCloseTo(-0.092916384554, 11);
		expect(nested.intercept).toBeCloseTo(1.047688079379, 11);
	});

	it.each(table)('has row %s of the permutation table', (...row) => {
		const [letters, z, slope, r, [ab = 0, abc = 0, root = 0], nodeSlope, nodeIntercept] = row;
		const overlap = arranged(letters);
		const pairs = lowerTriangle(overlap, 4);
		const line = linearRegression(ages, pairs);
		const { nodes, nested } = nodeAverages(tree, overlap);
		expect(mantel(ages, pairs).z).toBeCloseTo(z, 13);
		expect(line.slope).toBeCloseTo(slope, 13);
		expect(line.r).toBeCloseTo(r, 12);
		expect(nodes.map((node) => node.nested)).toEqual([root, abc, ab].map((mean) => expect.closeTo(mean, 13)));
		expect(nested.slope).toBeCloseTo(nodeSlope, 13);
		expect(nested.intercept).toBeCloseTo(nodeIntercept, 13);
	});

	it('has those rows, each twice, as its null', () => {
		const { values, arrangements } = enumerate(preparePermutation({ tree, overlap: overlapD }), { within: false });
		const ascending = (column: 2 | 5 | 'slopes') =>
			table
				.flatMap((row) => [row, row])
				.map((row) => (column === 5 ? row[5] : row[2]))
				.sort((a, b) => a - b);
		expect(arrangements).toBe(24);
		expect([...(values.slope ?? [])].sort((a, b) => a - b)).toEqual(ascending(2).map((s) => expect.closeTo(s, 13)));
		expect([...(values['nodes-nested'] ?? [])].sort((a, b) => a - b)).toEqual(ascending(5).map((s) => expect.closeTo(s, 13)));
		expect(distinct(values.slope ?? [])).toBe(9);
		expect(distinct(values['nodes-nested'] ?? [])).toBe(11);
	});

	it('has p = 2/24 and, within the deepest split, 2/6', () => {
		const { free, within } = permutationTest(preparePermutation({ tree, overlap: overlapD }), { permutations: 9999, seed: 1 });
		expect(free).toMatchObject({ exact: true, count: 24 });
		expect(free.statistics.slope).toMatchObject({ less: 2, greater: 24, pLess: 2 / 24, pTwoSided: 4 / 24 });
		expect(free.statistics['nodes-nested']).toMatchObject({ less: 2, pLess: 2 / 24 });
		expect(within).toMatchObject({ exact: true, count: 6, sides: [3, 1] });
		expect(within?.statistics.slope).toMatchObject({ less: 2, pLess: 2 / 6 });
	});

	it('has the same p with I, and 12 distinct slopes', () => {
		const design = preparePermutation({ tree, overlap: symmetricMatrix(i, 4, 1) });
		const { free } = permutationTest(design, { permutations: 9999, seed: 1 });
		expect(free.statistics.slope).toMatchObject({ less: 2, pLess: 2 / 24 });
		expect(distinct(free.values.slope ?? [])).toBe(12);
	});

	it('has the moments of z and the tails of the curves through them', () => {
		const { mean, variance, skewness } = mantelMoments(overlapD, ageMatrix);
		expect(mean).toBeCloseTo(289 / 30, 13);
		expect(variance).toBeCloseTo(71 / 225, 13);
		expect(skewness).toBeCloseTo(-0.937933602752, 11);
		const score = (43 / 5 - mean) / Math.sqrt(variance);
		expect(score).toBeCloseTo(-1.8395115702, 11);
		expect(normalTail(score)).toBeCloseTo(0.032919988849, 11);
		expect(pearsonThreeTail(score, skewness ?? Number.NaN)).toBeCloseTo(0.051809018104, 11);
	});

	it('has the regression on age and geography', () => {
		const { coefficients, rSquared } = multipleRegression([ages, geography], d);
		expect(coefficients).toEqual([606 / 685, -45 / 548, -61 / 2740].map((value) => expect.closeTo(value, 13)));
		expect(rSquared).toBeCloseTo(10147 / 10960, 13);
	});

	it('has the slopes that leave one species out', () => {
		const without = [0, 1, 2, 3].map((left) => {
			const kept: [number, number][] = [];
			let pair = 0;
			for (let a = 1; a < 4; a++)
				for (let b = 0; b < a; b++, pair++) if (a !== left && b !== left) kept.push([ages[pair] ?? 0, d[pair] ?? 0]);
			return linearRegression(
				kept.map(([age]) => age),
				kept.map(([, overlap]) => overlap)
			).slope;
		});
		expect(without).toEqual([-0.075, -0.125, -2 / 15, -0.15].map((slope) => expect.closeTo(slope, 13)));
	});
});

// The same overlaps on balanced trees: 5 distinct slopes and 4 of 24; with both cherries at one age 3 and 8 of 24.
describe('the balanced trees of the micro-example', () => {
	it.each([
		['((A:1,B:1):3,(C:2,D:2):2);', 5, 4],
		['((A:1,B:1):3,(C:1,D:1):3);', 3, 8]
	])('%s has %d distinct slopes, the least in %d arrangements', (newick, slopes, least) => {
		const design = preparePermutation({ tree: exampleTree(newick), overlap: overlapD });
		const all = enumerate(design, { within: false }).values.slope ?? new Float64Array(0);
		const lowest = Math.min(...all);
		expect(distinct(all)).toBe(slopes);
		expect(all.filter((slope) => slope < lowest + 1e-9).length).toBe(least);
	});
});
