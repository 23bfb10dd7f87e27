import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { drawnTree, exampleTree } from '../exampleTrees.ts';
import { pairBlocks } from '../pairBlocks.ts';
import { randomStream } from '../randomStream.ts';
import { fallCurve } from './fitFall.ts';
import { nodeAgesOf, nodeMeans } from './nodeMeans.ts';
import { AXES, halfOverlapTheta } from './randomWalkFall.ts';

// The worked example: (((A:1,B:1):1,C:2):2,D:4); D = AB .8, AC .7, BC .6, AD .4, BD .4, CD .5.
const micro = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
const MICRO_D = [
	[1, 0.8, 0.7, 0.4],
	[0.8, 1, 0.6, 0.4],
	[0.7, 0.6, 1, 0.5],
	[0.4, 0.4, 0.5, 1]
];

function nodesOf(tree: Parameters<typeof treeShape>[0]) {
	const shape = treeShape(tree);
	const layout = pairBlocks(shape);
	return { layout, nodes: nodeAgesOf(tree, shape, layout) };
}

describe('nodeMeans', () => {
	it('takes the plain mean of the pairs that meet at each node', () => {
		const means = nodeMeans(nodesOf(micro).layout, (row, column) => MICRO_D[row]?.[column] ?? 0);
		// By hand, root first: 1.3/3, 1.3/2, 0.8.
		expect([...means].map((mean) => mean.toFixed(12))).toEqual(['0.433333333333', '0.650000000000', '0.800000000000']);
	});
});

describe('fallCurve', () => {
	it('finds the least-squares k and half-overlap age of the worked example', () => {
		const { layout, nodes } = nodesOf(micro);
		const means = nodeMeans(layout, (row, column) => MICRO_D[row]?.[column] ?? 0);
		const { k, residual } = fallCurve('schoener-d', 1, nodes).fit(means);
		// R 4.2: uniroot of sum((o - E(k t)) sqrt(k t) / (1 + k t)), E(x) = 2 pt(sqrt(x), 1, lower.tail = FALSE), tol 1e-15.
		expect(k).toBeCloseTo(0.262751818992996, 12);
		// A minimiser written apart from this code stopped at half-overlap age 3.805872785, sum of squares over pairs .037198644.
		expect(halfOverlapTheta('schoener-d', 1) / k).toBeCloseTo(3.805872785, 7);
		// Within the nodes, by hand: AC, BC .005; AD, BD, CD 1/150.
		expect(residual + 0.005 + 1 / 150).toBeCloseTo(0.037198644, 9);
	});

	it('finds the k that made the means, for every measure and number of axes', () => {
		const { nodes } = nodesOf(drawnTree(30, randomStream(41, 0)));
		for (const measure of ['schoener-d', 'warren-i'] as const) {
			for (const axes of AXES) {
				const curve = fallCurve(measure, axes, nodes);
				for (const k of [0.01, 1, 30]) expect(curve.fit(curve.at(k)).k / k).toBeCloseTo(1, 8);
			}
		}
	});

	it('goes with the unit of age', () => {
		const tree = drawnTree(12, randomStream(42, 0));
		const [inMa, inKa] = [tree, { ...tree, ages: tree.ages.map((age) => 1000 * age) }].map((dated) => {
			const { nodes } = nodesOf(dated);
			return fallCurve('schoener-d', 1, nodes).fit(nodes.ages.map((_, slot) => 0.3 + 0.02 * slot)).k;
		});
		expect((inMa ?? 0) / (inKa ?? 1)).toBeCloseTo(1000, 6);
	});

	it('ends at a bound where nothing falls, and where everything has', () => {
		const { nodes } = nodesOf(drawnTree(12, randomStream(43, 0)));
		const curve = fallCurve('schoener-d', 2, nodes);
		expect(curve.fit(nodes.ages.map(() => 1)).k * Math.max(...nodes.ages)).toBeLessThan(1e-5);
		expect(curve.fit(nodes.ages.map(() => 0)).k * Math.max(...nodes.ages)).toBeGreaterThan(1e7);
	});
});
