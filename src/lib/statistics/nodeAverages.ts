import { type AgedTree, treeShape } from './agedTree.ts';
import { assertAllFinite } from './assertAllFinite.ts';
import { identityArrangement } from './arrangements.ts';
import { assertOverlap } from './assertOverlap.ts';
import { fitLine, type Line } from './linearRegression.ts';
import { nodeSumsByLoop } from './nodeSumsByLoop.ts';
import { pairBlocks } from './pairBlocks.ts';

export type NodeAverage = {
	/** preorder index in the tree */
	readonly node: number;
	readonly age: number;
	/** mean over the two sides of the node, each side split at its own nodes in turn */
	readonly nested: number;
	/** mean of all pairs that meet at the node */
	readonly plain: number;
	readonly pairs: number;
};

export type NodeAverages = {
	/** internal nodes in preorder */
	readonly nodes: readonly NodeAverage[];
	readonly nested: Line;
	readonly plain: Line;
};

/**
 * Average overlap across every internal node, and its line on node age. Nested: ō = Σ w o over the pairs that meet at
 * the node, w = Π 1/(number of children) over the nodes strictly below it on both paths; at a node with q children, the
 * mean over their q(q-1)/2 pairs. For two-way trees that is Σ (1/2)^(nodes between - 1) o. A polytomy's value is only
 * close to the mean over its resolutions. Nodes are dependent: the lines describe, their errors may not be tested.
 *
 * @param overlap - shape (n, n), row-major, tips in tree order
 * @throws {InputError} `non-finite`, `asymmetric`, `constant-ages`; `too-few-points` with a single internal node
 * @see Fitzpatrick & Turelli (2006), doi:10.1554/05-453.1
 */
export function nodeAverages(tree: AgedTree, overlap: Float64Array): NodeAverages {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	assertOverlap(overlap, tipCount);
	const layout = pairBlocks(shape);
	const sums = nodeSumsByLoop({ layout, overlap, tipCount }, identityArrangement(tipCount));

	const nodes = Array.from(shape.internal, (node, slot): NodeAverage => {
		const age = tree.ages[node] ?? Number.NaN;
		const pairs = layout.pairs[slot] ?? 0;
		return { node, age, nested: sums.nested[slot] ?? 0, plain: (sums.plain[slot] ?? 0) / pairs, pairs };
	});
	const ages = nodes.map(({ age }) => age);
	assertAllFinite(ages, 'node age');
	const nested = fitLine(
		ages,
		nodes.map((node) => node.nested)
	);
	const plain = fitLine(
		ages,
		nodes.map((node) => node.plain)
	);
	return { nodes, nested, plain };
}
