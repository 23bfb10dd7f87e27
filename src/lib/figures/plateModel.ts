import type { AnalysisResult, PlateData } from '#lib/contracts/analysisResult.ts';
import type { NodeAverage } from '#lib/contracts/drawnPlate.ts';
import type { CladeRow, TreesBlock } from '#lib/contracts/resultBlocks.ts';

type Line = { readonly slope: number; readonly intercept: number };

/** What a plate draws from: a finished result, or the part of it that is known while the shuffles still run. */
export type PlateInput = {
	readonly plate: PlateData;
	readonly regression: Line;
	readonly nodeAverages: {
		readonly nodes: readonly Pick<AnalysisResult['nodeAverages']['nodes'][number], 'node' | 'nested' | 'plain'>[];
		/** null while the node averages are not computed yet */
		readonly nested: Line | null;
		readonly plain: Line | null;
	};
	/** clades that were asked about; those that hold are marked */
	readonly clades?: readonly Pick<CladeRow, 'node' | 'holds'>[] | undefined;
	/** lines and node ages of all trees, where the test averages over them */
	readonly trees?: Pick<TreesBlock, 'lines' | 'nodes'> | undefined;
	/** null while nothing has been shuffled to the end */
	readonly permutation: Pick<AnalysisResult['permutation'], 'count' | 'exact'> | null;
};

/** Rows `from` to `to - 1` of the names, top to bottom. */
export type RowRange = { readonly from: number; readonly to: number };

/** An internal node of the tree with the pairs that meet there. */
export type PlateNode = RowRange & {
	/** preorder index in the tree */
	readonly node: number;
	readonly age: number;
	/** preorder index of the parent, -1 for the root */
	readonly parent: number;
	/** preorder indices of the daughters, tips included */
	readonly daughters: readonly number[];
	/** the rows of each daughter, in order */
	readonly sides: readonly RowRange[];
	readonly pairCount: number;
	/** mean overlap across the node */
	readonly mean: number;
};

export type PlateModel = {
	readonly species: readonly string[];
	readonly parent: readonly number[];
	readonly age: readonly number[];
	readonly rootAge: number;
	/** how the overlaps across a node are averaged */
	readonly average: NodeAverage;
	/** shape (nodes,); rows under every node; a tip has one */
	readonly rows: readonly RowRange[];
	/** internal nodes in preorder */
	readonly nodes: readonly PlateNode[];
	/** shape (pairs,); strict lower triangle in row order */
	readonly overlap: Float64Array;
	/** shape (pairs,); preorder index of the common ancestor of every pair, laid out like `overlap` */
	readonly ancestor: Int32Array;
};

/** Place of the pair of rows (i, j) in a strict lower triangle; the order of the two does not matter. */
export function pairPlace(i: number, j: number): number {
	const high = Math.max(i, j);
	return (high * (high - 1)) / 2 + Math.min(i, j);
}

/** Visits the pairs across a node, rows `i` above `j`. */
export function eachPairAcross(sides: readonly RowRange[], visit: (i: number, j: number) => void): void {
	for (const [index, upper] of sides.entries()) {
		for (const lower of sides.slice(index + 1)) {
			for (let i = upper.from; i < upper.to; i++) for (let j = lower.from; j < lower.to; j++) visit(i, j);
		}
	}
}

/**
 * Relations of tree and overlaps that every panel reads: rows under each node, pairs across each node, means.
 * Assumes that `plate.species` lists the tips in preorder, as the contract says. Cost: linear in the pairs.
 */
export function plateModel(input: PlateInput, average: NodeAverage = 'nested'): PlateModel {
	const { tree, species, overlapLower } = input.plate;
	const daughters = daughtersOf(tree.parent);
	const rows = rowsOf(tree.parent, daughters);
	const tipCount = rows[0]?.to ?? 0;
	if (tipCount !== species.length || overlapLower.length !== (tipCount * (tipCount - 1)) / 2) {
		throw new Error(`Plate data disagree: ${tipCount} tips, ${species.length} species, ${overlapLower.length} pairs.`);
	}
	const overlap = Float64Array.from(overlapLower);
	const ancestor = new Int32Array(overlap.length);
	const means = new Map(input.nodeAverages.nodes.map((row) => [row.node, row[average]]));
	const nodes: PlateNode[] = [];
	for (const [node, below] of daughters.entries()) {
		if (below.length === 0) continue;
		const sides = below.map((child) => rowRange(rows, child));
		let pairCount = 0;
		eachPairAcross(sides, (i, j) => {
			ancestor[pairPlace(i, j)] = node;
			pairCount += 1;
		});
		const mean =
			means.get(node) ??
			meanAcross(
				sides,
				overlap,
				below.map((child) => rowWeights(child, daughters, average))
			);
		const own = { node, age: tree.age[node] ?? 0, parent: tree.parent[node] ?? -1 };
		nodes.push({ ...own, ...rowRange(rows, node), daughters: below, sides, pairCount, mean });
	}
	return { species, parent: tree.parent, age: tree.age, rootAge: tree.age[0] ?? 0, average, rows, nodes, overlap, ancestor };
}

/** Weighted mean over all pairs of sides, each pair of sides counting alike in a nested mean. */
function meanAcross(sides: readonly RowRange[], overlap: Float64Array, weights: readonly (readonly number[])[]): number {
	let [sum, total] = [0, 0];
	for (const [a, upper] of sides.entries()) {
		for (const [offset, lower] of sides.slice(a + 1).entries()) {
			eachPairAcross([upper, lower], (i, j) => {
				const weight = (weights[a]?.[i - upper.from] ?? 0) * (weights[a + 1 + offset]?.[j - lower.from] ?? 0);
				sum += weight * (overlap[pairPlace(i, j)] ?? 0);
				total += weight;
			});
		}
	}
	return total > 0 ? sum / total : 0;
}

/** Weight of every row under a daughter: all alike, or halved (1 / ways) at every branching on the way to it. */
function rowWeights(root: number, daughters: readonly (readonly number[])[], average: NodeAverage): number[] {
	const weights: number[] = [];
	const open: [node: number, weight: number][] = [[root, 1]];
	for (let next = open.pop(); next; next = open.pop()) {
		const [node, weight] = next;
		const below = daughters[node] ?? [];
		if (below.length === 0) weights.push(weight);
		const share = average === 'nested' ? weight / below.length : weight;
		for (const child of below.toReversed()) open.push([child, share]);
	}
	return weights;
}

export function rowRange(rows: readonly RowRange[], node: number): RowRange {
	return rows[node] ?? { from: 0, to: 0 };
}

function daughtersOf(parent: readonly number[]): number[][] {
	const daughters: number[][] = parent.map(() => []);
	for (const [node, above] of parent.entries()) if (above >= 0) daughters[above]?.push(node);
	return daughters;
}

/** Preorder puts the tips of a clade side by side, so one pass forwards and one backwards give every node its rows. */
function rowsOf(parent: readonly number[], daughters: readonly (readonly number[])[]): RowRange[] {
	let next = 0;
	const from = daughters.map((below) => (below.length === 0 ? next++ : next));
	const to = daughters.map((below, node) => (below.length === 0 ? (from[node] ?? 0) + 1 : 0));
	for (let node = parent.length - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		to[above] = Math.max(to[above] ?? 0, to[node] ?? 0);
	}
	return from.map((first, node) => ({ from: first, to: to[node] ?? first }));
}

export function nodeOf(model: PlateModel, node: number): PlateNode | undefined {
	return model.nodes.find((candidate) => candidate.node === node);
}
