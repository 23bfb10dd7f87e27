/**
 * A rooted tree as arrays in preorder: node 0 is the root and every parent comes before its children, so
 * `parent[i] < i` for i > 0. Children keep the order of the text. No recursion is needed to walk it, whatever its depth.
 */
export type Tree = {
	/** shape (nodes,); index of the parent, -1 for the root */
	readonly parent: Int32Array;
	/** shape (nodes,); length of the branch above the node, unit of the text; NaN where the text gives none; 0 for the root */
	readonly length: Float64Array;
	/** shape (nodes,); number of children, 0 for a tip */
	readonly childCount: Int32Array;
	/** shape (nodes,); the label as shown: quotes resolved, an unquoted underscore is a blank; '' where there is none */
	readonly label: readonly string[];
	/** shape (nodes,); the label exactly as the text spells it, quotes included; '' where there is none */
	readonly labelRaw: readonly string[];
	/** annotations of metacomments by node index, values as text; only nodes that have some */
	readonly annotations: ReadonlyMap<number, Readonly<Record<string, string>>>;
};

/** A tree with the name its file gives it ('' when none) and what the file says of it. */
export type NamedTree = {
	readonly name: string;
	readonly tree: Tree;
	/** `[&R]` true, `[&U]` false, undefined when the text does not say */
	readonly rooted?: boolean;
	/** marked `*` in a TREES block */
	readonly isDefault?: boolean;
};

/** Indices of the tips in the order of the tree. */
export function tipIndices(tree: Tree): number[] {
	const tips: number[] = [];
	for (let node = 0; node < tree.parent.length; node++) if (tree.childCount[node] === 0) tips.push(node);
	return tips;
}

/** Labels of the tips, as shown, in the order of the tree. */
export function tipLabels(tree: Tree): string[] {
	return tipIndices(tree).map((node) => tree.label[node] ?? '');
}
