import type { LaidTree } from './posteriorTree.ts';

/** A way in which the root divides the species, and how many trees do it so. */
export type RootSplit = {
	/** shape (n,); which side each row stands on, sides numbered by their first row */
	readonly sideOf: Int32Array;
	count: number;
};

/** Counts the root split of a tree among those met before. Cost: n, times the splits that differ late. */
export function countRootSplitInPlace(splits: RootSplit[], { tree, tipFrom, tipTo, nodeTo }: LaidTree): void {
	const { rows, parent } = tree;
	const daughterOf = new Int32Array(rows.length);
	for (let child = 1; child < parent.length; child = nodeTo[child] ?? parent.length) {
		for (let tip = tipFrom[child] ?? 0; tip < (tipTo[child] ?? 0); tip++) daughterOf[rows[tip] ?? 0] = child;
	}
	const number = new Map<number, number>();
	const sideOf = daughterOf.map((daughter) => {
		const known = number.get(daughter) ?? number.size;
		number.set(daughter, known);
		return known;
	});
	const known = splits.find((split) => split.sideOf.every((side, row) => side === sideOf[row]));
	if (known === undefined) splits.push({ sideOf, count: 1 });
	else known.count += 1;
}

/** The split that most trees have; of several, the one met first. */
export function commonestSplit(splits: readonly RootSplit[]): RootSplit {
	const [first] = splits;
	if (first === undefined) throw new Error('A set of trees has at least one root split.');
	return splits.reduce((commonest, split) => (split.count > commonest.count ? split : commonest), first);
}
