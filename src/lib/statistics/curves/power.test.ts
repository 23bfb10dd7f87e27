import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from '../agedTree.ts';
import { exampleTree } from '../exampleTrees.ts';
import { type PermutationStatistic } from '../functionals.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { nextNormal, type RandomStream, randomStream } from '../randomStream.ts';
import { gaussianOverlap } from './gaussianOverlap.ts';
import { POWER_TRUTHS, rejectionShares, statisticPower, type WalkTruth } from './power.ts';
import { yuleTree } from './yuleTree.fixture.ts';

const SEED = 20261;

function overlapOf(places: readonly number[]): Float64Array {
	const lower = places.flatMap((a, i) => places.slice(0, i).map((b) => gaussianOverlap('schoener-d', Math.abs(a - b))));
	return symmetricMatrix(lower, places.length, 1);
}

function sharesOver(trees: readonly AgedTree[], one: (tree: AgedTree, i: number) => ReadonlyMap<PermutationStatistic, number>) {
	const sums = new Map<PermutationStatistic, number>();
	for (const [i, tree] of trees.entries()) {
		for (const [statistic, share] of one(tree, i)) sums.set(statistic, (sums.get(statistic) ?? 0) + share / trees.length);
	}
	return sums;
}

describe('statisticPower', () => {
	const trees = Array.from({ length: 200 }, (_, i) => yuleTree(20, randomStream(SEED, i, 90)));

	// Simulated apart from this code when the methods were written: pure-birth trees of 20, 500 walks, 199 shuffles, s.e. .02.
	// Here 200 trees with a walk each, s.e. .035 at most: .09 is over two of the two errors together.
	it.each([
		[
			{ theta: 0.25, axes: 1 },
			{ slope: 0.73, 'nodes-nested': 0.83 }
		],
		[
			{ theta: 1, axes: 1 },
			{ slope: 0.71, 'nodes-nested': 0.88, 'nodes-plain': 0.91, 'slope-log-age': 0.89, spearman: 0.62 }
		],
		[
			{ theta: 4, axes: 1 },
			{ slope: 0.73, 'nodes-nested': 0.9 }
		],
		[
			{ theta: 1, axes: 2 },
			{ slope: 0.94, 'nodes-nested': 0.99 }
		]
	] satisfies [WalkTruth, Partial<Record<PermutationStatistic, number>>][])(
		'finds a walk %o as often as published runs',
		(truth, told) => {
			const options = { truths: [truth], alpha: 0.05, simulations: 1, shuffles: 199 };
			const shares = sharesOver(trees, (tree, i) => {
				const { rows } = statisticPower(tree, { ...options, seed: SEED + i });
				return new Map(rows.map(({ statistic, power }) => [statistic, power[0] ?? 0]));
			});
			for (const [statistic, share] of Object.entries(told)) {
				const found = [...shares].find(([name]) => name === statistic)?.[1] ?? Number.NaN;
				expect(Math.abs(found - share), `${statistic}: ${found} against ${share}`).toBeLessThan(0.09);
			}
		}
	);

	it('gives every statistic a power for every truth, and equal bits for equal seeds', () => {
		const [tree] = trees;
		if (tree === undefined) throw new Error('No tree was drawn.');
		const options = { truths: POWER_TRUTHS, alpha: 0.05, simulations: 20, shuffles: 19, seed: 4 };
		const power = statisticPower(tree, options);
		expect(power.rows.map(({ statistic }) => statistic).sort()).toEqual(
			['nodes-nested', 'nodes-plain', 'slope', 'slope-log-age', 'spearman'].sort()
		);
		for (const row of power.rows) expect(row.power).toHaveLength(6);
		expect(power.standardError).toBeLessThanOrEqual(Math.sqrt(0.25 / 20));
		expect(statisticPower(tree, options)).toEqual(power);
	});

	it('finds nothing where the smallest p is above alpha', () => {
		// By hand: of 24 arrangements two are alike by the cherry, so exact p is 2/24 at least.
		const four = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
		const { rows } = statisticPower(four, { truths: POWER_TRUTHS, alpha: 0.08, simulations: 50, shuffles: 199, seed: 1 });
		for (const { power } of rows) expect(Math.max(...power)).toBe(0);
	});
});

describe('rejectionShares', () => {
	const noise = (tree: AgedTree) => {
		const count = treeShape(tree).tips.length;
		return (stream: RandomStream) => overlapOf(Array.from({ length: count }, () => 2 * nextNormal(stream)));
	};

	it('is alpha for every statistic when species are exchangeable', () => {
		// 2,000 data sets on 20 trees of 12; 99 % of counts lie within .05 ± 2.576 sqrt(.05 · .95 / 2000) = .0126.
		const trees = Array.from({ length: 20 }, (_, i) => yuleTree(12, randomStream(SEED, i, 91)));
		const options = { alpha: 0.05, simulations: 100, shuffles: 99, seed: SEED };
		const shares = sharesOver(trees, (tree, i) => rejectionShares(tree, noise(tree), { ...options, firstChunk: 100 * i }));
		expect(shares.size).toBe(5);
		for (const [statistic, share] of shares) expect(Math.abs(share - 0.05), `${statistic}: ${share}`).toBeLessThan(0.0126);
	});

	it('nearly always takes one old shift for a fall, but not within the deepest split', () => {
		// By the methods: freely .99 to 1; within the sides exact, so .05 ± 2.576 sqrt(.05 · .95 / 400) = .028.
		const tree = yuleTree(24, randomStream(SEED, 5, 92));
		const { children, tipTo } = treeShape(tree);
		const firstSide = tipTo[children[0]?.[0] ?? 0] ?? 0;
		expect(Math.min(firstSide, 24 - firstSide)).toBeGreaterThan(3);
		const shifted = (stream: RandomStream) =>
			overlapOf(Array.from({ length: 24 }, (_, tip) => (tip < firstSide ? 0 : 3) + nextNormal(stream)));
		const options = { alpha: 0.05, simulations: 400, shuffles: 99, seed: SEED, firstChunk: 0 };
		expect(rejectionShares(tree, shifted, options).get('slope')).toBeGreaterThan(0.95);
		for (const [statistic, share] of rejectionShares(tree, shifted, { ...options, within: true })) {
			expect(Math.abs(share - 0.05), `${statistic}: ${share}`).toBeLessThan(0.028);
		}
	});
});
