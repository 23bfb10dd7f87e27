import { crownNode, nodeAges } from './nodeAges.ts';
import type { Tree } from './tree.ts';

/** Ages this close, as a share of the root age, are one age: far above summing error, far below any dating. */
export const SAME_AGE = 1e-9;

/** Number of nodes with more than two children, the root among them. */
export function polytomies(tree: Tree): number {
	return tree.childCount.reduce((count, children) => (children > 2 ? count + 1 : count), 0);
}

/** Number of nodes with exactly one child. */
export function singleChildNodes(tree: Tree): number {
	return tree.childCount.reduce((count, children) => (children === 1 ? count + 1 : count), 0);
}

/** Number of branches without a length; the root has no branch. */
export function missingLengths(tree: Tree): number {
	return tree.length.reduce((count, length, node) => (node > 0 && Number.isNaN(length) ? count + 1 : count), 0);
}

/**
 * Whether all pairs of tips have one MRCA age, so that nothing can be regressed on age. Inner branches of length 0 do not
 * count; without lengths the branching alone decides.
 */
export function isStar(tree: Tree): boolean {
	const crown = crownNode(tree);
	if (missingLengths(tree) > 0) return tree.childCount.every((children, node) => node === crown || children < 2);
	const ages = nodeAges(tree);
	const oldest = ages[crown] ?? 0;
	return tree.childCount.every((children, node) => children < 2 || oldest - (ages[node] ?? 0) <= oldest * SAME_AGE);
}
