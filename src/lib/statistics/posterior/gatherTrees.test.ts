import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from '../exampleTrees.ts';
import { linearRegression } from '../linearRegression.ts';
import { lowerTriangle, symmetricMatrix } from '../pairValues.ts';
import { randomStream } from '../randomStream.ts';
import { gatherTrees } from './gatherTrees.ts';
import type { PosteriorTree } from './posteriorTree.ts';

/** A tree written down, its tips matched to rows A, B, C, … of the matrix. */
const posterior = (newick: string): PosteriorTree => {
	const { labels, ...tree } = exampleTree(newick);
	return { ...tree, rows: Int32Array.from(labels, (label) => label.charCodeAt(0) - 65) };
};

const MICRO = '(((A:1,B:1):1,C:2):2,D:4);';
const MICRO_D = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
const nameOf = (index: number) => `tree ${index + 1}`;

const gather = (newicks: readonly string[], statistics: Parameters<typeof gatherTrees>[0]['statistics'] = ['slope']) =>
	gatherTrees({
		trees: newicks.map(posterior),
		displayed: exampleTree(newicks[0] ?? MICRO),
		overlap: MICRO_D,
		tipCount: 4,
		statistics,
		nameOf
	});

describe('gatherTrees', () => {
	// Worked example, exact fractions: slope -31/265, intercept 238/265; the second tree is twice as old.
	it('gives the line of every tree', () => {
		const { slopes, intercepts, r, rootAges } = gather([MICRO, '(((A:2,B:2):2,C:4):4,D:8);']);
		expect(slopes[0]).toBeCloseTo(-31 / 265, 14);
		expect(slopes[1]).toBeCloseTo(-31 / 530, 14);
		expect(intercepts[0]).toBeCloseTo(238 / 265, 14);
		expect(intercepts[1]).toBeCloseTo(238 / 265, 14);
		expect(r[0]).toBeCloseTo(-0.952157431093, 12);
		expect([...rootAges]).toEqual([4, 8]);
	});

	it('agrees with the plain regression on drawn trees whose tips stand in other orders', () => {
		const stream = randomStream(5, 0, 8);
		const n = 12;
		const overlap = drawnOverlap(n, stream);
		const displayed = drawnTree(n, stream);
		const trees = Array.from({ length: 4 }, (_, index): PosteriorTree => {
			const rows = Int32Array.from({ length: n }, (_row, tip) => (tip * 5 + index) % n);
			return { ...drawnTree(n, stream, { polytomies: true }), rows };
		});
		const { slopes, intercepts, r } = gatherTrees({ trees, displayed, overlap, tipCount: n, statistics: [], nameOf });
		for (const [index, tree] of trees.entries()) {
			const ofTips = overlap.map((_, cell) => {
				const [i, j] = [tree.rows[Math.floor(cell / n)] ?? 0, tree.rows[cell % n] ?? 0];
				return overlap[i * n + j] ?? 0;
			});
			const plain = linearRegression(lowerTriangle(pairAgeMatrix(tree), n), lowerTriangle(ofTips, n));
			expect(slopes[index]).toBeCloseTo(plain.slope, 12);
			expect(intercepts[index]).toBeCloseTo(plain.intercept, 12);
			expect(r[index]).toBeCloseTo(plain.r, 12);
		}
	});

	// By hand: of three trees two hold AB, aged 1 and 3; all hold the root, aged 4, 4 and 6; none but the first holds ABC.
	it('gives the share of trees that hold each clade, and its age in those', () => {
		const { clades } = gather([MICRO, '((A:3,B:3):1,(C:2,D:2):2);', '(((A:1,D:1):1,C:2):4,B:6);']);
		expect(clades.map(({ node, share }) => [node, share])).toEqual([
			[0, 1],
			[1, 1 / 3],
			[2, 2 / 3]
		]);
		// Type-7 quantiles of two values: 1 + 0.025 · 2 and 1 + 0.975 · 2.
		expect(clades[2]?.age?.[0]).toBeCloseTo(1.05, 14);
		expect(clades[2]?.age?.[1]).toBeCloseTo(2.95, 14);
		expect(clades[1]?.age).toEqual([2, 2]);
	});

	it('says of a clade that no tree holds that it has no age', () => {
		const other = gatherTrees({
			trees: [posterior('((A:3,C:3):1,(B:2,D:2):2);')],
			displayed: exampleTree(MICRO),
			overlap: MICRO_D,
			tipCount: 4,
			statistics: ['slope'],
			nameOf
		});
		expect(other.clades[1]).toEqual({ node: 1, share: 0, age: null });
	});

	// By hand: ABC | D twice, once with its daughters turned round; AB | CD once.
	it('finds the commonest root split, whichever daughter is written first', () => {
		const { deepestSplit } = gather(['((A:3,B:3):1,(C:2,D:2):2);', MICRO, '(D:4,((B:1,A:1):1,C:2):2);']);
		expect([...deepestSplit.sideOf]).toEqual([0, 0, 0, 1]);
		expect(deepestSplit.share).toBeCloseTo(2 / 3, 14);
	});

	// By hand: pair ages of MICRO less their mean 17/6, over sqrt(53/6): AB (1 - 17/6).
	it('averages weights that are free of the unit of age', () => {
		const [one] = gather([MICRO]).averaged;
		const [both] = gather([MICRO, '(((A:20,B:20):20,C:40):40,D:80);']).averaged;
		expect(one?.weights[1]).toBeCloseTo((1 - 17 / 6) / Math.sqrt(53 / 6), 14);
		for (const [cell, weight] of (one?.weights ?? []).entries()) expect(both?.weights[cell]).toBeCloseTo(weight, 14);
	});

	it('names the tree in which all ages are one, or an age is 0', () => {
		expect(() => gather([MICRO, '(A:1,B:1,C:1,D:1);'])).toThrow(/^In tree 2: Expected ages that differ/);
		expect(() => gather([MICRO, '(((A:0,B:0):2,C:2):2,D:4);'], ['slope-log-age'])).toThrow(
			/^In tree 2: The slope on the logarithm/
		);
		expect(() => gather(['(((A:0,B:0):2,C:2):2,D:4);'])).not.toThrow();
	});

	it('refuses an empty set', () => {
		const nothing = { displayed: exampleTree(MICRO), overlap: MICRO_D, tipCount: 4, statistics: [], nameOf };
		expect(() => gatherTrees({ ...nothing, trees: [] })).toThrow(InputError);
	});
});
