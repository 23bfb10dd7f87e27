import type { AgedTree } from '../agedTree.ts';

/**
 * One tree of a set, pruned to the species that are tested. Trees hold their tips in orders of their own; `rows` says which
 * row of the matrix each tip is.
 */
export type PosteriorTree = AgedTree & {
	/** shape (tips,); row of the matrix of each tip, in the order of this tree */
	readonly rows: Int32Array;
};

/**
 * A tree laid out for visiting its pairs: which tips stand below each node, and which nodes are its children. Numbers only,
 * found in two passes, since a thousand trees are laid out one after the other.
 */
export type LaidTree = {
	readonly tree: PosteriorTree;
	/** shape (nodes,) each; position of the first tip below a node, and one past the last */
	readonly tipFrom: Int32Array;
	readonly tipTo: Int32Array;
	/** shape (nodes,); one past the last node below: the next child of the same parent, where there is one */
	readonly nodeTo: Int32Array;
	/** shape (nodes,); 0 for a tip */
	readonly childCount: Int32Array;
	/** shape (internal nodes,); node indices in preorder */
	readonly internal: Int32Array;
	/** shape (nodes,); place of an internal node in `internal`, -1 for a tip */
	readonly slotOf: Int32Array;
	/** shape (internal nodes,) each; ages, and pairs that meet there */
	readonly ages: Float64Array;
	readonly pairs: Float64Array;
};

export function layTree(tree: PosteriorTree): LaidTree {
	const { parent } = tree;
	const nodes = parent.length;
	const childCount = new Int32Array(nodes);
	for (let node = 1; node < nodes; node++) childCount[parent[node] ?? 0] = (childCount[parent[node] ?? 0] ?? 0) + 1;

	const internal = new Int32Array(nodes - tree.rows.length);
	const slotOf = new Int32Array(nodes).fill(-1);
	const tipFrom = new Int32Array(nodes);
	const tipTo = new Int32Array(nodes);
	const nodeTo = Int32Array.from(parent, (_, node) => node + 1);
	for (let node = 0, tip = 0, slot = 0; node < nodes; node++) {
		tipFrom[node] = tip;
		if (childCount[node] === 0) tip += 1;
		else {
			internal[slot] = node;
			slotOf[node] = slot++;
		}
		tipTo[node] = tip;
	}
	const pairs = new Float64Array(internal.length);
	for (let node = nodes - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		const to = tipTo[node] ?? 0;
		const from = tipFrom[node] ?? 0;
		if (to > (tipTo[above] ?? 0)) tipTo[above] = to;
		nodeTo[above] = Math.max(nodeTo[above] ?? 0, nodeTo[node] ?? 0);
		const slot = slotOf[above] ?? 0;
		pairs[slot] = (pairs[slot] ?? 0) + (to - from) * (from - (tipFrom[above] ?? 0));
	}
	const ages = Float64Array.from(internal, (node) => tree.ages[node] ?? Number.NaN);
	return { tree, tipFrom, tipTo, nodeTo, childCount, internal, slotOf, ages, pairs };
}
