import type { AgedTree } from '../agedTree.ts';
import { quantiles } from '../quantiles.ts';
import { layTree, type LaidTree } from './posteriorTree.ts';

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
};

/** The rows of the matrix stand in the order of the displayed tree, so each of its clades is a run of rows. */
export function cladeCollector(displayed: AgedTree): CladeCollector {
	const rowCount = tipCountOf(displayed);
	const { internal, tipFrom, tipTo } = layTree({ ...displayed, rows: Int32Array.from({ length: rowCount }, (_, row) => row) });
	const placeOf = new Map(
		Array.from(internal, (node, place) => [(tipFrom[node] ?? 0) * (rowCount + 1) + (tipTo[node] ?? 0), place])
	);
	return { nodes: internal, placeOf, ages: Array.from(internal, () => []), rowCount };
}

/** Adds the ages of the clades that a tree shares with the displayed one. Cost: its nodes. */
export function collectCladesInPlace(
	{ placeOf, ages, rowCount }: CladeCollector,
	{ tree, tipFrom, tipTo, slotOf }: LaidTree
): void {
	const { parent, rows } = tree;
	const lowest = new Int32Array(parent.length).fill(rowCount);
	const highest = new Int32Array(parent.length).fill(-1);
	for (let node = parent.length - 1; node >= 0; node--) {
		const tip = tipFrom[node] ?? 0;
		if (slotOf[node] === -1) lowest[node] = highest[node] = rows[tip] ?? 0;
		const low = lowest[node] ?? 0;
		const high = highest[node] ?? 0;
		// As many rows as tips between the lowest and the highest: the clade is a run of rows.
		if (slotOf[node] !== -1 && high - low + 1 === (tipTo[node] ?? 0) - tip) {
			const place = placeOf.get(low * (rowCount + 1) + high + 1);
			if (place !== undefined) ages[place]?.push(tree.ages[node] ?? 0);
		}
		const above = parent[node] ?? -1;
		if (above < 0) continue;
		lowest[above] = Math.min(lowest[above] ?? 0, low);
		highest[above] = Math.max(highest[above] ?? 0, high);
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

function tipCountOf({ parent }: AgedTree): number {
	const inner = new Set(parent);
	return parent.filter((_, node) => !inner.has(node)).length;
}
