import type { AgedTree } from '../agedTree.ts';

/**
 * One tree of a set, pruned to the species that are tested. Trees hold their tips in orders of their own; `rows` says which
 * row of the matrix each tip is.
 */
export type PosteriorTree = AgedTree & {
	/** shape (tips,); row of the matrix of each tip, in the order of this tree */
	readonly rows: Int32Array;
};

/** Numbers per block: slot of the node, then the run of its rows, and where its columns begin; they end where the rows begin. */
export const LAID_BLOCK_WIDTH = 4;

/**
 * A tree laid out for visiting its pairs. The arrays are made once for the largest tree of n tips and used again for every
 * tree of a set, for a thousand trees of small arrays keep the memory cleaner busier than the sums. What stands past the
 * counts is of an earlier tree.
 */
export type LaidTree = {
	tree: PosteriorTree;
	internalCount: number;
	blockCount: number;
	/** shape (nodes,) each; position of the first tip below a node, and one past the last */
	readonly tipFrom: Int32Array;
	readonly tipTo: Int32Array;
	/** shape (nodes,); place of an internal node among the internal nodes, -1 for a tip */
	readonly slotOf: Int32Array;
	/** shape (internal nodes,), in preorder: node, children, one past the last block, age, pairs that meet there */
	readonly nodeOf: Int32Array;
	readonly childCount: Int32Array;
	readonly blockTo: Int32Array;
	readonly ages: Float64Array;
	readonly pairs: Float64Array;
	/** each later child of a node against all earlier ones; see `LAID_BLOCK_WIDTH`; node after node, children backwards */
	readonly blocks: Int32Array;
};

const NO_TREE: PosteriorTree = { parent: new Int32Array(0), ages: new Float64Array(0), rows: new Int32Array(0) };

/** Room for any tree of so many tips. */
export function roomForTree(tipCount: number): LaidTree {
	const nodes = 2 * tipCount - 1;
	return {
		tree: NO_TREE,
		internalCount: 0,
		blockCount: 0,
		tipFrom: new Int32Array(nodes),
		tipTo: new Int32Array(nodes),
		slotOf: new Int32Array(nodes),
		nodeOf: new Int32Array(tipCount),
		childCount: new Int32Array(tipCount),
		blockTo: new Int32Array(tipCount),
		ages: new Float64Array(tipCount),
		pairs: new Float64Array(tipCount),
		blocks: new Int32Array(LAID_BLOCK_WIDTH * tipCount)
	};
}

/** Lays a tree out in the room of an earlier one. */
export function layTreeInPlace(laid: LaidTree, tree: PosteriorTree): void {
	const { parent } = tree;
	const { tipTo, slotOf, blockTo, childCount } = laid;
	laid.tree = tree;
	countChildrenInPlace(laid);
	for (let node = parent.length - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		if ((tipTo[node] ?? 0) > (tipTo[above] ?? 0)) tipTo[above] = tipTo[node] ?? 0;
	}
	let blocks = 0;
	for (let slot = 0; slot < laid.internalCount; slot++) {
		blockTo[slot] = blocks;
		blocks += (childCount[slot] ?? 0) - 1;
	}
	laid.blockCount = blocks;
	for (let node = parent.length - 1; node > 0; node--) addBlockInPlace(laid, node, slotOf[parent[node] ?? 0] ?? 0);
}

function countChildrenInPlace(laid: LaidTree): void {
	const { tree, tipFrom, tipTo, slotOf, nodeOf, childCount, ages, pairs } = laid;
	const { parent } = tree;
	slotOf.fill(-1, 0, parent.length);
	for (let node = 1; node < parent.length; node++) slotOf[parent[node] ?? 0] = 0;
	let tips = 0;
	let slots = 0;
	for (let node = 0; node < parent.length; node++) {
		tipFrom[node] = tips;
		if (slotOf[node] === -1) tips++;
		else {
			slotOf[node] = slots;
			nodeOf[slots] = node;
			ages[slots] = tree.ages[node] ?? Number.NaN;
			childCount[slots] = 0;
			pairs[slots++] = 0;
		}
		tipTo[node] = tips;
		const above = slotOf[parent[node] ?? 0] ?? 0;
		if (node > 0) childCount[above] = (childCount[above] ?? 0) + 1;
	}
	laid.internalCount = slots;
}

/** The first child of a node has no earlier one to stand against. */
function addBlockInPlace({ tree, tipFrom, tipTo, blockTo, pairs, blocks }: LaidTree, node: number, slot: number): void {
	const columnFrom = tipFrom[tree.parent[node] ?? 0] ?? 0;
	const rowFrom = tipFrom[node] ?? 0;
	if (rowFrom === columnFrom) return;
	const rowTo = tipTo[node] ?? 0;
	const at = LAID_BLOCK_WIDTH * (blockTo[slot] ?? 0);
	blockTo[slot] = (blockTo[slot] ?? 0) + 1;
	blocks[at] = slot;
	blocks[at + 1] = rowFrom;
	blocks[at + 2] = rowTo;
	blocks[at + 3] = columnFrom;
	pairs[slot] = (pairs[slot] ?? 0) + (rowTo - rowFrom) * (rowFrom - columnFrom);
}
