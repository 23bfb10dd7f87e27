import fc from 'fast-check';
import type { Tree } from '#lib/phylogeny/tree.ts';

/** A tree as nested objects: the shape tests think in, built without any of the code they test. */
export type NestedTree = { readonly label: string; readonly length: number; readonly children: readonly NestedTree[] };

type Shape = { length: number; children: Shape[] };

/**
 * Trees of 2 to some dozens of tips, with polytomies and single-child nodes, tips labelled t0, t1, … in order.
 *
 * @param lengths - arbitrary of a branch length
 */
export function nestedTrees(lengths: fc.Arbitrary<number>): fc.Arbitrary<NestedTree> {
	const { shape } = fc.letrec<{ shape: Shape }>((tie) => ({
		shape: fc.record({
			length: lengths,
			children: fc.oneof(
				{ maxDepth: 4, depthSize: 'small' },
				fc.constant<Shape[]>([]),
				fc.array(tie('shape'), { minLength: 1, maxLength: 3 })
			)
		})
	}));
	return fc.array(shape, { minLength: 2, maxLength: 4 }).map((children) => labelled({ length: 0, children }));
}

/** Newick text by plain recursion: an oracle for the iterative writer and reader. */
export function nestedText({ label, length, children }: NestedTree): string {
	return `${children.length === 0 ? '' : `(${children.map(nestedText).join(',')})`}${label}:${length}`;
}

/** The arrays of a nested tree by plain recursion: an oracle for the reader. */
export function nestedArrays(root: NestedTree): Pick<Tree, 'parent' | 'length' | 'childCount' | 'label'> {
	const rows: { parent: number; node: NestedTree }[] = [];
	const visit = (node: NestedTree, parent: number): void => {
		const index = rows.push({ parent, node }) - 1;
		for (const child of node.children) visit(child, index);
	};
	visit(root, -1);
	return {
		parent: Int32Array.from(rows, ({ parent }) => parent),
		length: Float64Array.from(rows, ({ node }, index) => (index === 0 ? 0 : node.length)),
		childCount: Int32Array.from(rows, ({ node }) => node.children.length),
		label: rows.map(({ node }) => node.label)
	};
}

function labelled(shape: Shape): NestedTree {
	let count = 0;
	const label = ({ length, children }: Shape): NestedTree => {
		if (children.length === 0) return { label: `t${count++}`, length, children: [] };
		return { label: '', length, children: children.map(label) };
	};
	return label(shape);
}
