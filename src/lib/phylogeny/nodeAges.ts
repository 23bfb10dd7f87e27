import { InputError } from '#lib/remarks/inputError.ts';
import type { Tree } from './tree.ts';

/**
 * A tip this close to the deepest one, as a share of the deepest root-to-tip distance, lives now: the difference is
 * rounding of the text. Dimensionless; the first band of `ultrametricRemark`.
 */
export const PRESENT_TOLERANCE = 1e-6;

/**
 * Distance of every node from the root.
 *
 * @param tree - lengths finite and >= 0; the root's own length counts for nothing
 * @returns shape (nodes,); unit of the branch lengths, >= 0, never less than the parent's
 * @throws {InputError} `missing-length` when a branch has no length; `non-finite` or `negative-length` on such a length
 */
export function nodeDepths(tree: Tree): Float64Array {
	const { length, parent } = tree;
	const depths = new Float64Array(parent.length);
	for (let node = 1; node < parent.length; node++) {
		const above = length[node] ?? NaN;
		if (!(above >= 0 && above < Infinity)) refuseLength(tree, node, above);
		depths[node] = (depths[parent[node] ?? 0] ?? 0) + above;
	}
	return depths;
}

/**
 * Age of every node: largest root-to-tip distance minus the node's own distance from the root. A tip within
 * `PRESENT_TOLERANCE` of the deepest has age 0 exactly; any other tip keeps its own age, so that a fossil stays one.
 *
 * @param tree - lengths finite and >= 0
 * @returns shape (nodes,); unit of the branch lengths, >= 0
 * @throws {InputError} as `nodeDepths`
 */
export function nodeAges(tree: Tree): Float64Array {
	const depths = nodeDepths(tree);
	const height = deepestTip(tree, depths);
	const present = height * PRESENT_TOLERANCE;
	return depths.map((depth, node) => {
		const age = height - depth;
		return tree.childCount[node] === 0 && age <= present ? 0 : age;
	});
}

/**
 * Age of the most recent common ancestor of all tips: the first node that branches, so that a stem written as a node with
 * a single child counts for nothing.
 *
 * @returns unit of the branch lengths, >= 0
 * @throws {InputError} as `nodeDepths`
 */
export function rootAge(tree: Tree): number {
	return nodeAges(tree)[crownNode(tree)] ?? 0;
}

/** Index of the first node from the root that has not exactly one child. */
export function crownNode(tree: Tree): number {
	let node = 0;
	while (tree.childCount[node] === 1) node += 1;
	return node;
}

function deepestTip(tree: Tree, depths: Float64Array): number {
	let height = 0;
	for (const [node, depth] of depths.entries()) if (tree.childCount[node] === 0 && depth > height) height = depth;
	return height;
}

function refuseLength(tree: Tree, node: number, length: number): never {
	const label = tree.label[node] ?? '';
	const branch = label === '' ? `the branch above node ${node}` : `the branch of "${label}"`;
	const where = label === '' ? undefined : { name: label };
	const rule = 'Expected every branch length to be a number of at least 0';
	if (Number.isNaN(length)) {
		const message = `Expected every branch to have a length; ${branch} has none. Ages cannot be computed: bring the dated tree.`;
		throw new InputError('missing-length', message, where);
	}
	throw new InputError(length < 0 ? 'negative-length' : 'non-finite', `${rule}; ${branch} has ${length}.`, where);
}
