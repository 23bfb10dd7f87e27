import { describe, expect, it } from 'vitest';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from './exampleTrees.ts';
import { nodeAverages } from './nodeAverages.ts';
import { symmetricMatrix } from './pairValues.ts';
import { randomStream } from './randomStream.ts';

describe('nodeAverages', () => {
	// By hand: the root of the polytomy ((A,B),C,D): pairs of children (AB,C) .4, (AB,D) .3, (C,D) .9, mean 1.6/3;
	// plain: (.5+.3+.2+.4+.9)/5.
	it('averages a polytomy over the pairs of its children', () => {
		const overlap = symmetricMatrix([0.8, 0.5, 0.3, 0.2, 0.4, 0.9], 4, 1);
		const { nodes } = nodeAverages(exampleTree('((A:1,B:1):2,C:3,D:3);'), overlap);
		expect(nodes[0]).toMatchObject({ node: 0, age: 3, pairs: 5 });
		expect(nodes[0]?.nested).toBeCloseTo(1.6 / 3, 14);
		expect(nodes[0]?.plain).toBeCloseTo(2.3 / 5, 14);
		expect(nodes[1]).toMatchObject({ node: 1, age: 1, pairs: 1, nested: 0.8, plain: 0.8 });
	});

	it('has the same nested and plain averages on a balanced tree', () => {
		const tree = exampleTree('(((A:1,B:1):1,(C:1,D:1):1):1,((E:1,F:1):1,(G:1,H:1):1):1);');
		const { nodes } = nodeAverages(tree, drawnOverlap(8, randomStream(4, 0, 8), 5));
		for (const { nested, plain } of nodes) expect(nested).toBeCloseTo(plain, 14);
	});

	// By property: a line is a line on either average, because all pairs of a node have its age.
	it('recovers a straight fall of overlap with age', () => {
		const tree = drawnTree(12, randomStream(9, 0, 8));
		const inner = nodeAverages(tree, drawnOverlap(12, randomStream(9, 1, 8))).nodes;
		const oldest = Math.max(...inner.map(({ age }) => age));
		const ages = nodeAverages(tree, agesAsOverlaps(tree, 12));
		const fall = nodeAverages(
			tree,
			agesAsOverlaps(tree, 12).map((age) => 1 - age / (2 * oldest))
		);
		expect(ages.nested.slope).toBeCloseTo(1, 12);
		expect(fall.nested.slope).toBeCloseTo(-1 / (2 * oldest), 12);
		expect(fall.plain.intercept).toBeCloseTo(1, 12);
		expect(fall.plain.rSquared).toBeCloseTo(1, 12);
	});

	it('refuses a tree of one node and a matrix that is not symmetric or not complete', () => {
		const pair = exampleTree('(A:1,B:1);');
		expect(() => nodeAverages(pair, Float64Array.of(1, 0.5, 0.5, 1))).toThrow('Expected at least 2 points for a line; got 1.');
		const tree = exampleTree('((A:1,B:1):1,C:2);');
		expect(() => nodeAverages(tree, Float64Array.of(1, 0.5, 0.4, 0.6, 1, 0.3, 0.4, 0.3, 1))).toThrow(
			'rows 2 and 1 have 0.6 and 0.5'
		);
		expect(() => nodeAverages(tree, Float64Array.of(1, 0.5, NaN, 0.5, 1, 0.3, NaN, 0.3, 1))).toThrow(
			'rows 3 and 1 have NaN and NaN'
		);
	});
});

function agesAsOverlaps(tree: ReturnType<typeof drawnTree>, n: number): Float64Array {
	return pairAgeMatrix(tree).map((age, cell) => (cell % (n + 1) === 0 ? 1 : age));
}
