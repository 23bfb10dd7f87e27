import type { TreeShape } from '../agedTree.ts';

/** Species that a test of clades treats as one: a clade of the tree, or a group that somebody declared. */
export type SpeciesGroup = {
	/** preorder index; null for a declared group that is no clade of the tree */
	readonly node: number | null;
	/** positions in tree order, ascending */
	readonly members: Int32Array;
};

/** Every clade of at least `minTips` species, the whole tree apart, in preorder. */
export function cladesOf({ internal, tipFrom, tipTo }: TreeShape, minTips: number): SpeciesGroup[] {
	const clades: SpeciesGroup[] = [];
	for (const node of internal.subarray(1)) {
		const from = tipFrom[node] ?? 0;
		const tips = (tipTo[node] ?? 0) - from;
		if (tips >= minTips) clades.push({ node, members: Int32Array.from({ length: tips }, (_, i) => from + i) });
	}
	return clades;
}

/** A declared group of positions, with its node when the tree has that clade. */
export function groupOf({ internal, tipFrom, tipTo }: TreeShape, positions: readonly number[]): SpeciesGroup {
	const members = Int32Array.from(new Set(positions)).sort();
	const from = members[0] ?? 0;
	const to = (members.at(-1) ?? 0) + 1;
	const isRun = to - from === members.length;
	const node = isRun ? internal.find((clade) => tipFrom[clade] === from && tipTo[clade] === to) : undefined;
	return { node: node ?? null, members };
}
