import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AgedTree } from './agedTree.ts';
import { identityArrangement } from './arrangements.ts';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from './exampleTrees.ts';
import { mantelTest } from './mantelTest.ts';
import { symmetricMatrix } from './pairValues.ts';
import { PERMUTATION_STATISTICS, preparePermutation } from './permutationDesign.ts';
import { permutationTest, type PermutationProgress } from './permutationTest.ts';
import { randomStream } from './randomStream.ts';
import { enumerate } from './runChunks.ts';

const test = (tree: AgedTree, overlap: Float64Array, permutations = 999, seed = 1) =>
	permutationTest(preparePermutation({ tree, overlap }), { permutations, seed });

/** The matrix of the same species in another order. */
const reordered = (overlap: Float64Array, order: Int32Array) => {
	const n = order.length;
	return overlap.map((_, cell) => overlap[(order[Math.floor(cell / n)] ?? 0) * n + (order[cell % n] ?? 0)] ?? 0);
};

describe('permutationTest', () => {
	it('enumerates up to 8 species whatever was asked, and beyond where n! is not larger', () => {
		const stream = randomStream(3, 0, 8);
		const eight = test(drawnTree(8, stream), drawnOverlap(8, stream), 99);
		expect(eight.free).toMatchObject({ exact: true, count: 40_320 });
		const nine = { tree: drawnTree(9, stream), overlap: drawnOverlap(9, stream) };
		expect(test(nine.tree, nine.overlap, 999).free).toMatchObject({ exact: false, count: 999 });
		expect(test(nine.tree, nine.overlap, 362_880).free).toMatchObject({ exact: true, count: 362_880 });
	});

	// By hand: two sides of five have 5! · 5! = 14,400 arrangements, though ten species have 3.6 million.
	it('decides within the deepest split by the arrangements of the sides', () => {
		const ten = exampleTree('(((((A:1,B:1):1,C:2):1,D:3):1,E:4):1,((((F:1,G:1):1,H:2):1,I:3):1,J:4):1);');
		const outcome = test(ten, drawnOverlap(10, randomStream(1, 2, 8)), 999);
		expect(outcome.free.exact).toBe(false);
		expect(outcome.within).toMatchObject({ exact: true, count: 14_400, sides: [5, 5] });
	});

	// By hand: sides of 3 and 1 have 3! = 6 arrangements; 3 of 6 pairs meet at the root.
	it('leaves a side of one species alone within the deepest split', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
		const { within } = test(tree, drawnOverlap(4, randomStream(4, 0, 8)));
		expect(within).toMatchObject({ exact: true, count: 6, rootPairShare: 0.5 });
	});

	it('has Monte Carlo p-values within 4 standard errors of the exact ones', () => {
		const stream = randomStream(8, 0, 8);
		const n = 9;
		const design = preparePermutation({ tree: drawnTree(n, stream), overlap: drawnOverlap(n, stream) });
		const sampled = permutationTest(design, { permutations: 9999, seed: 12 }).free;
		const exact = enumerate(design, { within: false, keep: [] });
		for (const statistic of PERMUTATION_STATISTICS) {
			const p = (exact.counts[statistic]?.less ?? 0) / exact.arrangements;
			expect(Math.abs((sampled.statistics[statistic]?.pLess ?? 0) - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / 9999) + 1e-4);
		}
	});

	it('counts what the plain double loop counts, from the same seed', () => {
		fc.assert(
			fc.property(fc.integer({ min: 9, max: 20 }), fc.integer({ min: 0, max: 1e6 }), (n, seed) => {
				const stream = randomStream(seed, n, 8);
				const tree = drawnTree(n, stream, { polytomies: true });
				const overlap = drawnOverlap(n, stream);
				const { statistics } = test(tree, overlap, 299, seed).free;
				const plain = mantelTest(pairAgeMatrix(tree), overlap, { permutations: 299, seed });
				expect(statistics.slope).toMatchObject({ less: plain.pearson.less, greater: plain.pearson.greater });
				expect(statistics.spearman).toMatchObject({ less: plain.spearman.less, greater: plain.spearman.greater });
			}),
			{ numRuns: 25 }
		);
	});

	it('keeps its p when ages are stretched, moved, or overlaps rescaled', () => {
		fc.assert(
			fc.property(fc.integer({ min: 4, max: 6 }), fc.integer({ min: 0, max: 1e6 }), (n, seed) => {
				const stream = randomStream(seed, n, 8);
				const tree = drawnTree(n, stream);
				const overlap = drawnOverlap(n, stream);
				fc.pre(new Set(overlap).size > 2);
				const plain = test(tree, overlap).free.statistics;
				const stretched = { parent: tree.parent, ages: tree.ages.map((age) => 1000 * age) };
				const moved = { parent: tree.parent, ages: tree.ages.map((age) => (age > 0 ? age + 5 : 0)) };
				const stretchedTest = test(stretched, overlap).free.statistics;
				const movedTest = test(moved, overlap).free.statistics;
				const rescaled = test(
					tree,
					overlap.map((o) => 3 * o + 2)
				).free.statistics;
				for (const statistic of PERMUTATION_STATISTICS) {
					const tails = { less: plain[statistic]?.less, greater: plain[statistic]?.greater };
					expect(stretchedTest[statistic]).toMatchObject(tails);
					expect(rescaled[statistic]).toMatchObject(tails);
					if (statistic !== 'slope-log-age') expect(movedTest[statistic]).toMatchObject(tails);
				}
				expect((stretchedTest.slope?.observed ?? 0) * 1000).toBeCloseTo(plain.slope?.observed ?? 0, 10);
			}),
			{ numRuns: 40 }
		);
	});

	// By property: the p-values of all n! starting arrangements rank them; those at most a are at most a of all. Here every
	// relabelling of the data is one start, so the share of starts with p <= a must not exceed a.
	it('has super-uniform exact p-values', () => {
		const stream = randomStream(21, 0, 8);
		for (let data = 0; data < 10; data++) {
			const tree = drawnTree(5, stream, { polytomies: data % 2 === 1 });
			const overlap = drawnOverlap(5, stream, 1);
			if (tree.parent.filter((above) => above === 0).length === 5) continue;
			const order = identityArrangement(5);
			const all = enumerateOrders(order).map((each) => test(tree, reordered(overlap, each)).free.statistics);
			for (const statistic of PERMUTATION_STATISTICS) {
				for (const tail of ['pLess', 'pGreater'] as const) {
					const ps = all.map((each) => each[statistic]?.[tail] ?? 0);
					for (const a of new Set(ps)) {
						expect(ps.filter((p) => p <= a + 1e-12).length / ps.length).toBeLessThanOrEqual(a + 1e-12);
					}
				}
			}
		}
	});

	// By hand: overlap equal to minus age is -1; only the arrangements that leave the ages alone reach it. Two cherries of
	// one age that can also change places: 2 · 2 · 2 = 8 of 24.
	it('reaches |Aut| / n! where overlap is a straight fall of age', () => {
		const tree = exampleTree('((A:1,B:1):1,(C:1,D:1):1);');
		const overlap = pairAgeMatrix(tree).map((age) => 1 - age / 4);
		const { statistics } = test(tree, overlap).free;
		expect(statistics.slope).toMatchObject({ less: 8, greater: 24, pLess: 8 / 24, pGreater: 1 });
		expect(statistics['nodes-nested']).toMatchObject({ less: 8, greater: 24 });
	});

	// By hand: 0.4 + 0.8 and 0.7 + 0.5 are 1.2 but for rounding; the arrangements ADBC and ADCB of the micro-example tie.
	it('ties arrangements that only rounding tells apart', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		const asADBC = reordered(overlap, Int32Array.of(0, 3, 1, 2));
		// In the table 6 pairs of rows lie below the four rows with z = 10, and 2 above: less 2·(6 + 4), greater 2·(4 + 2).
		expect(test(tree, asADBC).free.statistics.slope).toMatchObject({ less: 20, greater: 12 });
	});

	it('does not depend on the order in which species were given, within the tree', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):2,(D:3,E:3):1);');
		const turned = exampleTree('((E:3,D:3):1,(C:2,(B:1,A:1):1):2);');
		const overlap = drawnOverlap(5, randomStream(6, 0, 8));
		const order = Int32Array.of(4, 3, 2, 1, 0);
		const one = test(tree, overlap);
		const other = test(turned, reordered(overlap, order));
		for (const statistic of PERMUTATION_STATISTICS) {
			const tails = { less: one.free.statistics[statistic]?.less, greater: one.free.statistics[statistic]?.greater };
			expect(other.free.statistics[statistic]).toMatchObject(tails);
		}
	});

	it('reports every arrangement once and every new slope', () => {
		const stream = randomStream(31, 0, 8);
		const design = preparePermutation({ tree: drawnTree(12, stream), overlap: drawnOverlap(12, stream) });
		const reports: PermutationProgress[] = [];
		const outcome = permutationTest(design, { permutations: 1000, seed: 2, onProgress: (progress) => reports.push(progress) });
		const free = reports.filter(({ question }) => question === 'free');
		expect(free.flatMap(({ newSlopes }) => [...newSlopes])).toEqual([...(outcome.free.values.slope ?? [])]);
		expect(free.at(-1)?.asked.counts.slope).toMatchObject({ less: outcome.free.statistics.slope?.less });
		expect(reports.at(-1)?.done).toBe(reports.at(-1)?.total);
		expect(free.length).toBe(4);
	});

	it('stops where the caller throws', () => {
		const stream = randomStream(31, 0, 8);
		const design = preparePermutation({ tree: drawnTree(12, stream), overlap: drawnOverlap(12, stream) });
		const onProgress = () => {
			throw new Error('stopped');
		};
		expect(() => permutationTest(design, { permutations: 1000, seed: 2, onProgress })).toThrow('stopped');
	});

	it('gives the same bits again, and others for another seed', () => {
		const stream = randomStream(41, 0, 8);
		const [tree, overlap] = [drawnTree(12, stream), drawnOverlap(12, stream)];
		expect(test(tree, overlap, 500, 9)).toEqual(test(tree, overlap, 500, 9));
		expect(test(tree, overlap, 500, 9)).not.toEqual(test(tree, overlap, 500, 10));
	});

	// By property: pairs across the root have one age, so shuffles within the sides cannot see them.
	it('within the deepest split, is blind to overlaps across the root', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):2,((D:1.5,E:1.5):1,F:2.5):1.5);');
		const overlap = drawnOverlap(6, randomStream(2, 0, 8));
		const side = (tip: number) => Math.floor(tip / 3);
		const raised = overlap.map((o, cell) => (side(Math.floor(cell / 6)) === side(cell % 6) ? o : 1 - 0.9 * o));
		const [one, other] = [test(tree, overlap).within, test(tree, raised).within];
		expect(one?.count).toBe(36);
		expect(other?.statistics.slope).toMatchObject({ less: one?.statistics.slope?.less, greater: one?.statistics.slope?.greater });
	});
});

function enumerateOrders(first: Int32Array): Int32Array[] {
	if (first.length <= 1) return [first];
	return Array.from(first).flatMap((head) =>
		enumerateOrders(first.filter((entry) => entry !== head)).map((tail) => Int32Array.of(head, ...tail))
	);
}
