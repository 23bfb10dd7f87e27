import { InputError } from '#lib/remarks/inputError.ts';
import { type Tree, tipIndices } from './tree.ts';

/**
 * Age of the most recent common ancestor of every pair of tips.
 *
 * @param ages - shape (nodes,); as `nodeAges` gives them
 * @param tips - node indices of the tips wanted, in the order wanted; all tips in tree order by default
 * @returns shape (n x n,), row-major; unit of `ages`; symmetric, diagonal 0
 * @throws {InputError} `not-a-tip` or `duplicate-tip` when `tips` holds an inner node or a tip twice; `non-finite` on such an age
 *
 * Cost: n^2 writes, in runs as long as the clades; a caterpillar costs no more than a balanced tree.
 */
export function mrcaAges(tree: Tree, ages: Float64Array, tips: readonly number[] = tipIndices(tree)): Float64Array {
	const bad = ages.findIndex((age) => !Number.isFinite(age));
	if (bad !== -1) throw new InputError('non-finite', `Expected the age of node ${bad} to be a finite number; got ${ages[bad]}.`);
	return inOrder(tree, tips, (blocks) => fillBlocks(blocks, ages, new Float64Array(tips.length ** 2)));
}

/**
 * Index of the most recent common ancestor of every pair of tips; on the diagonal the tip itself. Parameters, errors and
 * cost as `mrcaAges`.
 *
 * @returns shape (n x n,), row-major; node indices
 */
export function mrcaNodes(tree: Tree, tips: readonly number[] = tipIndices(tree)): Int32Array {
	const self = Int32Array.from(tree.parent, (_, node) => node);
	const nodes = inOrder(tree, tips, (blocks) => fillBlocks(blocks, self, new Int32Array(tips.length ** 2)));
	for (const [position, tip] of tips.entries()) nodes[position * tips.length + position] = tip;
	return nodes;
}

/** The wanted tips in tree order, and for every node the run of them that it holds: from `first` up to, not with, `end`. */
type Blocks = { readonly tree: Tree; readonly tips: readonly number[]; readonly first: Int32Array; readonly end: Int32Array };

/** Fills in tree order, where every clade is one run, and reorders only when another order is wanted. */
function inOrder<T extends Float64Array | Int32Array>(tree: Tree, tips: readonly number[], fill: (blocks: Blocks) => T): T {
	const sorted = [...tips].sort((a, b) => a - b);
	refuseBadTips(tree, sorted);
	const filled = fill(cladeRuns(tree, sorted));
	if (sorted.every((tip, position) => tip === tips[position])) return filled;
	const rank = new Map(sorted.map((tip, position) => [tip, position]));
	const from = Int32Array.from(tips, (tip) => rank.get(tip) ?? 0);
	const source = filled.slice();
	const count = tips.length;
	for (let row = 0; row < count; row++) {
		const base = (from[row] ?? 0) * count;
		for (let column = 0; column < count; column++) filled[row * count + column] = source[base + (from[column] ?? 0)] ?? 0;
	}
	return filled;
}

function cladeRuns(tree: Tree, tips: readonly number[]): Blocks {
	const nodeCount = tree.parent.length;
	const first = new Int32Array(nodeCount).fill(tips.length);
	const end = new Int32Array(nodeCount);
	for (const [position, tip] of tips.entries()) {
		first[tip] = position;
		end[tip] = position + 1;
	}
	for (let node = nodeCount - 1; node > 0; node--) {
		const above = tree.parent[node] ?? 0;
		first[above] = Math.min(first[above] ?? 0, first[node] ?? 0);
		end[above] = Math.max(end[above] ?? 0, end[node] ?? 0);
	}
	return { tree, tips, first, end };
}

/** Row by row, walking up from the tip: what an ancestor holds beyond the clade walked so far gets the ancestor's value. */
function fillBlocks<T extends Float64Array | Int32Array>({ tree, tips, first, end }: Blocks, values: T, out: T): T {
	const count = tips.length;
	for (const [position, tip] of tips.entries()) {
		const row = position * count;
		let from = position;
		let to = position + 1;
		for (let node = tree.parent[tip] ?? -1; node >= 0 && to - from < count; node = tree.parent[node] ?? -1) {
			const value = values[node] ?? 0;
			const low = first[node] ?? 0;
			const high = end[node] ?? 0;
			if (low < from) out.fill(value, row + low, row + from);
			if (high > to) out.fill(value, row + to, row + high);
			from = low;
			to = high;
		}
	}
	return out;
}

function refuseBadTips(tree: Tree, sorted: readonly number[]): void {
	for (const [position, tip] of sorted.entries()) {
		if (tree.childCount[tip] !== 0)
			throw new InputError(
				'not-a-tip',
				`Expected the index of a tip; node ${tip} has ${tree.childCount[tip] ?? 'no place in the tree'}.`
			);
		if (tip === sorted[position - 1])
			throw new InputError('duplicate-tip', `Expected every tip once; tip "${tree.label[tip]}" stands twice.`);
	}
}
