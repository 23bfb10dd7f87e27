import { type AgedTree, treeShape } from '../agedTree.ts';

/** A tree as the trait models read it: variance gathered along each branch, per unit of rate. */
export type TraitTree = {
	/** shape (nodes,), preorder, -1 for the root */
	readonly parent: Int32Array;
	/** shape (nodes,); variance that the branch above the node adds; 0 for the root */
	readonly edges: Float64Array;
	/** node index of every tip, in tree order */
	readonly tips: Int32Array;
	/** root age, the unit of the tree */
	readonly height: number;
};

/** How much variance a lineage has gathered from the root to a node of some age: what tells the models apart. */
export type Gathered = (age: number, isTip: boolean) => number;

/** Brownian motion: variance grows with time since the root, so the covariance of two tips is root age − MRCA age. */
export function brownianTree(tree: AgedTree): TraitTree {
	const height = tree.ages[0] ?? 0;
	return transformedTree(tree, (age) => height - age);
}

/**
 * The tree whose branches hold the variance of another model. Every model used here has, on a tree of living species,
 * a covariance that falls with the age of the common ancestor only, so each is a Brownian motion on branches of
 * other lengths.
 */
export function transformedTree(tree: AgedTree, gathered: Gathered): TraitTree {
	const { tips } = treeShape(tree);
	const isTip = new Uint8Array(tree.parent.length);
	for (const tip of tips) isTip[tip] = 1;
	const at = Float64Array.from(tree.ages, (age, node) => gathered(age, isTip[node] === 1));
	const edges = Float64Array.from(tree.parent, (above, node) => (above < 0 ? 0 : (at[node] ?? 0) - (at[above] ?? 0)));
	return { parent: tree.parent, edges, tips, height: tree.ages[0] ?? 0 };
}

/** Pagel's λ: what species share is multiplied by it, what each has gathered in all is kept. */
export function lambdaTree(tree: AgedTree, lambda: number): TraitTree {
	const height = tree.ages[0] ?? 0;
	return transformedTree(tree, (age, isTip) => (isTip ? 1 : lambda) * (height - age));
}

/** White noise: every species by itself, with variance 1. */
export function noiseTree(tree: AgedTree): TraitTree {
	return transformedTree(tree, (_, isTip) => (isTip ? 1 : 0));
}

/**
 * Ornstein–Uhlenbeck with one optimum, the root standing at it:
 * V_ij = (exp(−2α t_ij) − exp(−2α T)) / 2α with t_ij the age of the MRCA and T that of the root.
 *
 * @param pull - α > 0, per unit of the tree; the half-life is ln 2 / α
 */
export function pulledTree(tree: AgedTree, pull: number): TraitTree {
	const height = tree.ages[0] ?? 0;
	return transformedTree(tree, (age) => (Math.exp(-2 * pull * age) * -Math.expm1(-2 * pull * (height - age))) / (2 * pull));
}

/**
 * Early burst: the rate changes as e^(r s) with time s since the root, so V = (e^(r s) − 1) / r.
 *
 * @param change - r < 0, per unit of the tree
 */
export function burstTree(tree: AgedTree, change: number): TraitTree {
	const height = tree.ages[0] ?? 0;
	return transformedTree(tree, (age) => Math.expm1(change * (height - age)) / change);
}
