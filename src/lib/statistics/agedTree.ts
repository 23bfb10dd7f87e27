/**
 * A dated tree as arrays in preorder. `parent` has shape (nodes,), -1 for the root; `ages` has shape (nodes,), in the
 * unit of the tree, before the tips. The tree is pruned: no node has a single child; polytomies are allowed. The edge
 * of `analysis` checks this once; the functions of this room rely on it.
 */
export type AgedTree = { readonly parent: Int32Array; readonly ages: Float64Array };

/** Where the tips of each node stand. Tips below a node are neighbours in preorder, so two numbers tell them. */
export type TreeShape = {
	/** node index of every tip, in tree order; a tip's place in this list is its position */
	readonly tips: Int32Array;
	/** node index of every internal node, in preorder */
	readonly internal: Int32Array;
	/** shape (nodes,); position of the first tip below the node (a tip: of itself) */
	readonly tipFrom: Int32Array;
	/** shape (nodes,); one past the position of the last tip below the node */
	readonly tipTo: Int32Array;
	/** children of every node, in tree order; empty for a tip */
	readonly children: readonly (readonly number[])[];
};

/** The tips, internal nodes, children and tip positions of a tree, found in two passes over its arrays. */
export function treeShape({ parent }: AgedTree): TreeShape {
	const children: number[][] = Array.from(parent, () => []);
	for (const [node, above] of parent.entries()) if (above >= 0) children[above]?.push(node);

	const tips: number[] = [];
	const internal: number[] = [];
	const tipFrom = new Int32Array(parent.length);
	const tipTo = new Int32Array(parent.length);
	for (const [node, below] of children.entries()) {
		tipFrom[node] = tips.length;
		(below.length === 0 ? tips : internal).push(node);
		tipTo[node] = tips.length;
	}
	for (let node = parent.length - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		tipTo[above] = Math.max(tipTo[above] ?? 0, tipTo[node] ?? 0);
	}
	return { tips: Int32Array.from(tips), internal: Int32Array.from(internal), tipFrom, tipTo, children };
}
