type Tree = { readonly parent: readonly number[]; readonly label: readonly string[] };

/**
 * The tips below a node.
 * @param tree - preorder: every node comes after its parent
 * @param node - preorder index; one that is not in the tree has no tips
 */
export function cladeSpecies({ parent, label }: Tree, node: number): string[] {
	const isInside = parent.map(() => false);
	const isInner = parent.map(() => false);
	for (const [index, above] of parent.entries()) {
		isInside[index] = index === node || isInside[above] === true;
		if (above >= 0) isInner[above] = true;
	}
	return label.filter((_, index) => isInside[index] === true && isInner[index] === false);
}
