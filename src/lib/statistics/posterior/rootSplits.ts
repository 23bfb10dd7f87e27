import { LAID_BLOCK_WIDTH, type LaidTree } from './posteriorTree.ts';

/** A way in which the root divides the species, and how many trees do it so. */
export type RootSplit = {
	/** shape (n,); which side each row stands on, sides numbered by their first row */
	readonly sideOf: Int32Array;
	count: number;
};

/** Counts the root split of a tree among those met before. Cost: n, times the splits that differ late. */
export function countRootSplitInPlace(splits: RootSplit[], laid: LaidTree): void {
	const sideOf = rootSides(laid);
	for (const split of splits) {
		if (!areEqual(split.sideOf, sideOf)) continue;
		split.count += 1;
		return;
	}
	splits.push({ sideOf, count: 1 });
}

/** The side of each row, sides numbered in the order of their first rows. */
function rootSides({ tree, blocks, childCount }: LaidTree): Int32Array {
	const { rows } = tree;
	const sideOf = new Int32Array(rows.length);
	const daughters = childCount[0] ?? 0;
	// The blocks of the root stand first, one for each daughter but the first, which keeps the 0 of a new array.
	for (let daughter = 1; daughter < daughters; daughter++) {
		const at = (daughter - 1) * LAID_BLOCK_WIDTH;
		for (let tip = blocks[at + 1] ?? 0; tip < (blocks[at + 2] ?? 0); tip++) sideOf[rows[tip] ?? 0] = daughter;
	}
	const numberOf = new Int32Array(daughters).fill(-1);
	let sides = 0;
	for (let row = 0; row < sideOf.length; row++) {
		const daughter = sideOf[row] ?? 0;
		if (numberOf[daughter] === -1) numberOf[daughter] = sides++;
		sideOf[row] = numberOf[daughter] ?? 0;
	}
	return sideOf;
}

function areEqual(one: Int32Array, other: Int32Array): boolean {
	for (let row = 0; row < one.length; row++) if (one[row] !== other[row]) return false;
	return true;
}

/** The split that most trees have; of several, the one met first. */
export function commonestSplit(splits: readonly RootSplit[]): RootSplit {
	const [first] = splits;
	if (first === undefined) throw new Error('A set of trees has at least one root split.');
	return splits.reduce((commonest, split) => (split.count > commonest.count ? split : commonest), first);
}
