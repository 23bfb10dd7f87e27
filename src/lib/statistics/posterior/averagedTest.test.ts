import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AgedTree } from '../agedTree.ts';
import { identityArrangement, nextArrangementInPlace } from '../arrangements.ts';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from '../exampleTrees.ts';
import { linearRegression } from '../linearRegression.ts';
import { lowerTriangle, symmetricMatrix } from '../pairValues.ts';
import { PERMUTATION_STATISTICS, preparePermutation } from '../permutationDesign.ts';
import { permutationTest } from '../permutationTest.ts';
import { randomStream } from '../randomStream.ts';
import { averagedTest } from './averagedTest.ts';
import { gatherTrees } from './gatherTrees.ts';
import type { PosteriorTree } from './posteriorTree.ts';

const nameOf = (index: number) => `tree ${index + 1}`;
const inOrder = (tree: AgedTree, n: number): PosteriorTree => ({ ...tree, rows: identityArrangement(n) });

/** The test over some trees; the first is drawn, and its tips are the rows of the matrix. */
function testOver(trees: readonly PosteriorTree[], overlap: Float64Array, permutations = 999, seed = 1) {
	const tipCount = Math.sqrt(overlap.length);
	const [displayed = trees[0]] = trees;
	if (displayed === undefined) throw new Error('A test needs a tree.');
	const gathered = gatherTrees({ trees, displayed, overlap, tipCount, statistics: PERMUTATION_STATISTICS, nameOf });
	return averagedTest({ overlap, tipCount, gathered, permutations, seed });
}

/** Turns the daughters of every node round, so that the tips stand in the opposite order; each keeps its row. */
function turned({ parent, ages, rows }: PosteriorTree): PosteriorTree {
	const children: number[][] = Array.from(parent, () => []);
	for (const [node, above] of parent.entries()) if (above >= 0) children[above]?.push(node);
	const order: number[] = [];
	const visit = (node: number): void => {
		order.push(node);
		for (const child of [...(children[node] ?? [])].reverse()) visit(child);
	};
	visit(0);
	const rowOf = new Map<number, number>();
	for (const [node, below] of children.entries()) if (below.length === 0) rowOf.set(node, rows[rowOf.size] ?? 0);
	const place = new Map(order.map((node, index) => [node, index]));
	return {
		parent: Int32Array.from(order, (node) => place.get(parent[node] ?? -1) ?? -1),
		ages: Float64Array.from(order, (node) => ages[node] ?? 0),
		rows: Int32Array.from(order.flatMap((node) => rowOf.get(node) ?? []))
	};
}

describe('averagedTest', () => {
	// By property: the mean over equal trees is the value of one, and both tests read the same shuffles.
	it('gives one tree, or many equal ones, the counts of the test on that tree', () => {
		fc.assert(
			fc.property(
				fc.integer({ min: 5, max: 13 }),
				fc.integer({ min: 0, max: 1e6 }),
				fc.integer({ min: 1, max: 7 }),
				(n, seed, b) => {
					const stream = randomStream(seed, n, 8);
					const tree = drawnTree(n, stream, { polytomies: true });
					const overlap = drawnOverlap(n, stream);
					fc.pre(new Set(overlap).size > 2 && tree.parent.filter((above) => above === 0).length < n);
					const { free, within } = permutationTest(preparePermutation({ tree, overlap }), { permutations: 299, seed });
					const averaged = testOver(new Array<PosteriorTree>(b).fill(inOrder(tree, n)), overlap, 299, seed);
					for (const statistic of PERMUTATION_STATISTICS) {
						const [one, all] = [free.statistics[statistic], averaged.free.statistics[statistic]];
						expect(all).toMatchObject({ less: one?.less, greater: one?.greater, pLess: one?.pLess });
						expect(all?.observed).toBeCloseTo(one?.observed ?? NaN, 12);
						const inside = within?.statistics[statistic];
						if (inside)
							expect(averaged.within?.statistics[statistic]).toMatchObject({ less: inside.less, greater: inside.greater });
					}
				}
			),
			{ numRuns: 12 }
		);
	});

	// Worked example, exact fractions: -31/265, -4/35, -101/840; 2 of 24 arrangements, 2 of 6 within ABC | D.
	it('gives the worked example', () => {
		const micro = inOrder(exampleTree('(((A:1,B:1):1,C:2):2,D:4);'), 4);
		const { free, within } = testOver([micro, micro], symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1));
		expect(free.statistics.slope).toMatchObject({ less: 2, pLess: 2 / 24 });
		expect(free.statistics.slope?.observed).toBeCloseTo(-31 / 265, 13);
		expect(free.statistics['nodes-nested']?.observed).toBeCloseTo(-4 / 35, 13);
		expect(free.statistics['nodes-plain']?.observed).toBeCloseTo(-101 / 840, 13);
		expect(within).toMatchObject({ exact: true, count: 6 });
		expect(within?.statistics.slope?.less).toBe(2);
		expect(within).toMatchObject({ sides: [3, 1], rootPairShare: 0.5 });
	});

	// R 4: o <- c(.8, .7, .6, .4, .4, .5); t1 <- c(1, 2, 2, 4, 4, 4); t2 <- c(3, 4, 4, 4, 4, 2); ss <- function(x) sum((x - mean(x))^2);
	// mean(c(cor(o, t1), cor(o, t2))) * sqrt(ss(o)) * mean(1 / sqrt(c(ss(t1), ss(t2)))), likewise with log2(t); and the mean of
	// cor(o, t, method = "spearman").
	it('agrees with R on the mean over two trees', () => {
		const trees = ['(((A:1,B:1):1,C:2):2,D:4);', '((A:3,B:3):1,(C:2,D:2):2);'].map((newick) => inOrder(exampleTree(newick), 4));
		const { statistics } = testOver(trees, symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1)).free;
		expect(statistics.slope?.observed).toBeCloseTo(-0.0873448453547904, 13);
		expect(statistics['slope-log-age']?.observed).toBeCloseTo(-0.155713657393181, 13);
		expect(statistics.spearman?.observed).toBeCloseTo(-0.62401694494212, 13);
	});

	// By brute force: for every arrangement, the correlation with each of two trees, and their mean.
	it('counts what averaging two correlations by hand counts', () => {
		const n = 6;
		for (let data = 0; data < 8; data++) {
			const stream = randomStream(77, data, 8);
			const overlap = drawnOverlap(n, stream);
			const [one, other] = [drawnTree(n, stream), drawnTree(n, stream)];
			const trees = [inOrder(one, n), { ...other, rows: Int32Array.of(3, 1, 5, 0, 2, 4) }];
			const pairsOf = (arrangement: Int32Array, rows: Int32Array) =>
				lowerTriangle(
					overlap.map((_, cell) => {
						const [i, j] = [rows[Math.floor(cell / n)] ?? 0, rows[cell % n] ?? 0];
						return overlap[(arrangement[i] ?? 0) * n + (arrangement[j] ?? 0)] ?? 0;
					}),
					n
				);
			const ages = trees.map((tree) => lowerTriangle(pairAgeMatrix(tree), n));
			const meanOf = (arrangement: Int32Array) =>
				trees.reduce((sum, { rows }, t) => sum + linearRegression(ages[t] ?? [], pairsOf(arrangement, rows)).r / 2, 0);
			const arrangement = identityArrangement(n);
			const observed = meanOf(arrangement);
			let [less, greater] = [0, 0];
			do {
				const value = meanOf(arrangement);
				if (value <= observed + 1e-10) less += 1;
				if (value >= observed - 1e-10) greater += 1;
			} while (nextArrangementInPlace(arrangement, [{ from: 0, to: n }]));
			expect(testOver(trees, overlap).free).toMatchObject({ exact: true, count: 720, statistics: { slope: { less, greater } } });
		}
	});

	// By property: every tree's ages are divided by their own spread, so a unit changes nothing.
	it('does not heed the scale of single trees', () => {
		const stream = randomStream(9, 0, 8);
		const n = 10;
		const overlap = drawnOverlap(n, stream);
		const trees = Array.from({ length: 5 }, () => inOrder(drawnTree(n, stream), n));
		const scaled = trees.map(({ ages, ...tree }, index) => ({ ...tree, ages: ages.map((age) => age * 3 ** index) }));
		const [plain, other] = [testOver(trees, overlap), testOver(scaled, overlap)];
		for (const statistic of PERMUTATION_STATISTICS) {
			const { less, greater } = plain.free.statistics[statistic] ?? {};
			expect(other.free.statistics[statistic]).toMatchObject({ less, greater });
		}
	});

	it('does not heed the order of tips in single trees', () => {
		const stream = randomStream(19, 0, 8);
		const n = 11;
		const overlap = drawnOverlap(n, stream);
		const trees = Array.from({ length: 4 }, () => inOrder(drawnTree(n, stream, { polytomies: true }), n));
		const [plain, other] = [
			testOver(trees, overlap),
			testOver(
				trees.map((tree, i) => (i > 0 ? turned(tree) : tree)),
				overlap
			)
		];
		for (const statistic of PERMUTATION_STATISTICS) {
			const { less, greater, observed = 0 } = plain.free.statistics[statistic] ?? {};
			expect(other.free.statistics[statistic]).toMatchObject({ less, greater });
			expect(other.free.statistics[statistic]?.observed).toBeCloseTo(observed, 12);
		}
	});

	// By hand: AC | BD, though the drawn tree has AB | CD; each side has two orders: 2 · 2 arrangements.
	it('moves species within the sides of the commonest root split, though they are no neighbours in the drawn tree', () => {
		const [drawn, common] = [exampleTree('((A:1,B:1):3,(C:2,D:2):2);'), exampleTree('((A:1,C:1):3,(B:2,D:2):2);')];
		const rows = Int32Array.of(0, 2, 1, 3);
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.3, 0.5], 4, 1);
		const { within } = testOver([inOrder(drawn, 4), { ...common, rows }, { ...common, rows }], overlap);
		expect(within).toMatchObject({ exact: true, count: 4 });
		expect(within?.sides).toEqual([2, 2]);
	});

	// By hand: sides of two and one; the two have 2! orders.
	it('leaves a side of one species alone', () => {
		const tree = inOrder(exampleTree('((A:1,B:1):1,C:2);'), 3);
		const { within } = testOver([tree], symmetricMatrix([0.8, 0.7, 0.6], 3, 1));
		expect(within?.count).toBe(2);
		expect(within?.sides).toEqual([2, 1]);
	});

	it('gives the same bits again, reports every arrangement, and stops where the caller throws', () => {
		const stream = randomStream(3, 3, 8);
		const n = 12;
		const overlap = drawnOverlap(n, stream);
		const trees = Array.from({ length: 3 }, () => inOrder(drawnTree(n, stream), n));
		expect(testOver(trees, overlap, 600, 5)).toEqual(testOver(trees, overlap, 600, 5));
		const gathered = gatherTrees({
			trees,
			displayed: trees[0] ?? drawnTree(n, stream),
			overlap,
			tipCount: n,
			statistics: ['slope'],
			nameOf
		});
		const told: number[] = [];
		const asked = { overlap, tipCount: n, gathered, permutations: 600, seed: 5 };
		averagedTest({ ...asked, onProgress: ({ question, done }) => question === 'free' && told.push(done) });
		expect(told).toEqual([256, 512, 600]);
		const onProgress = () => {
			throw new Error('stopped');
		};
		expect(() => averagedTest({ ...asked, onProgress })).toThrow('stopped');
	});
});
