import type { AgedTree } from '../agedTree.ts';
import { quantiles } from '../quantiles.ts';
import { layTreeInPlace, type LaidTree, roomForTree } from './posteriorTree.ts';

/** How a clade of the displayed tree fares in the set. */
export type CladeAge = {
	/** preorder index in the displayed tree */
	readonly node: number;
	/** share of trees that hold the clade, in [0, 1] */
	readonly share: number;
	/** 95 % equal-tailed interval of its age in the trees that hold it; null when none does */
	readonly age: [number, number] | null;
};

/** Clades of the displayed tree, with room for their ages; a clade is the run of rows from `from` to before `to`. */
export type CladeCollector = {
	readonly nodes: Int32Array;
	/** place of the clade that begins at a row and ends before another, by `from * (n + 1) + to` */
	readonly placeOf: ReadonlyMap<number, number>;
	readonly ages: readonly number[][];
	readonly rowCount: number;
	/** shape (nodes,) each; lowest and highest row below each node of the tree being read */
	readonly lowest: Int32Array;
	readonly highest: Int32Array;
};

/** The rows of the matrix stand in the order of the displayed tree, so each of its clades is a run of rows. */
export function cladeCollector(displayed: AgedTree, rowCount: number): CladeCollector {
	const laid = roomForTree(rowCount);
	layTreeInPlace(laid, { ...displayed, rows: Int32Array.from({ length: rowCount }, (_, row) => row) });
	const nodes = laid.nodeOf.slice(0, laid.internalCount);
	const { tipFrom, tipTo } = laid;
	const placeOf = new Map(
		Array.from(nodes, (node, place) => [(tipFrom[node] ?? 0) * (rowCount + 1) + (tipTo[node] ?? 0), place])
	);
	return { nodes, placeOf, ages: Array.from(nodes, () => []), rowCount, lowest: tipFrom.slice(), highest: tipTo.slice() };
}

/** Adds the ages of the clades that a tree shares with the displayed one. Cost: its nodes. */
export function collectCladesInPlace(
	{ placeOf, ages, rowCount, lowest, highest }: CladeCollector,
	{ tree, tipFrom, tipTo, slotOf }: LaidTree
): void {
	const { parent, rows } = tree;
	lowest.fill(rowCount, 0, parent.length);
	highest.fill(-1, 0, parent.length);
	for (let node = parent.length - 1; node >= 0; node--) {
		const tip = tipFrom[node] ?? 0;
		const isTip = slotOf[node] === -1;
		const low = isTip ? (rows[tip] ?? 0) : (lowest[node] ?? 0);
		const high = isTip ? low : (highest[node] ?? 0);
		// As many rows as tips between the lowest and the highest: the clade is a run of rows.
		if (!isTip && high - low + 1 === (tipTo[node] ?? 0) - tip) {
			const place = placeOf.get(low * (rowCount + 1) + high + 1);
			if (place !== undefined) ages[place]?.push(tree.ages[node] ?? 0);
		}
		const above = parent[node] ?? -1;
		if (above < 0) continue;
		if (low < (lowest[above] ?? 0)) lowest[above] = low;
		if (high > (highest[above] ?? 0)) highest[above] = high;
	}
}

/** The root is held by every tree: its interval is that of the age of the tree. */
export function cladeAges({ nodes, ages }: CladeCollector, treeCount: number): CladeAge[] {
	return Array.from(nodes, (node, place) => {
		const held = ages[place] ?? [];
		if (held.length === 0) return { node, share: 0, age: null };
		const [low = 0, high = 0] = quantiles(Float64Array.from(held), [0.025, 0.975]).map(([, age]) => age);
		return { node, share: held.length / treeCount, age: [low, high] };
	});
}
