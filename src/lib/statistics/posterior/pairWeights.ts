import type { PermutationStatistic } from '../permutationDesign.ts';
import type { LaidTree } from './posteriorTree.ts';

type Scored = { readonly statistic: PermutationStatistic; readonly scores: Float64Array };

/**
 * Adds what one tree makes of every pair to a matrix of weights: the statistic of that tree is Σ weight · overlap. Each pair
 * is visited once and written to one of its two cells, (row, column) or (column, row); `foldPairsInPlace` joins the two.
 *
 * @param weights - shape (n, n), row-major, by row of the matrix; added to
 * @param scored - a statistic with its `nodeScores`
 */
export function addPairWeightsInPlace(weights: Float64Array, laid: LaidTree, { statistic, scores }: Scored): void {
	const { tree, internal, childCount, tipFrom, tipTo, nodeTo, pairs } = laid;
	const { rows } = tree;
	const nested = statistic === 'nodes-nested';
	// Nested: 1/(number of children) multiplied over the nodes below the one being visited; children come before parents.
	const share = new Float64Array(rows.length).fill(1);
	for (let slot = internal.length - 1; slot >= 0; slot--) {
		const node = internal[slot] ?? 0;
		const q = childCount[node] ?? 0;
		const columnFrom = tipFrom[node] ?? 0;
		const score = scores[slot] ?? 0;
		const weight = nested ? (score * 2) / (q * (q - 1)) : statistic === 'nodes-plain' ? score / (pairs[slot] ?? 1) : score;
		for (let child = nodeTo[node + 1] ?? 0; child < (nodeTo[node] ?? 0); child = nodeTo[child] ?? 0) {
			const block = { rowFrom: tipFrom[child] ?? 0, rowTo: tipTo[child] ?? 0, columnFrom };
			if (nested) addSharesInPlace(weights, rows, { ...block, weight, share });
			else addInPlace(weights, rows, { ...block, weight });
		}
		if (nested) for (let tip = columnFrom; tip < (tipTo[node] ?? 0); tip++) share[tip] = (share[tip] ?? 0) / q;
	}
}

/** A child's tips, against those of the children before it. */
type Block = { readonly rowFrom: number; readonly rowTo: number; readonly columnFrom: number; readonly weight: number };

function addInPlace(weights: Float64Array, rows: Int32Array, { rowFrom, rowTo, columnFrom, weight }: Block): void {
	for (let row = rowFrom; row < rowTo; row++) {
		const start = (rows[row] ?? 0) * rows.length;
		for (let column = columnFrom; column < rowFrom; column++) {
			const cell = start + (rows[column] ?? 0);
			weights[cell] = (weights[cell] ?? 0) + weight;
		}
	}
}

function addSharesInPlace(weights: Float64Array, rows: Int32Array, block: Block & { readonly share: Float64Array }): void {
	const { rowFrom, rowTo, columnFrom, weight, share } = block;
	for (let row = rowFrom; row < rowTo; row++) {
		const start = (rows[row] ?? 0) * rows.length;
		const ofRow = weight * (share[row] ?? 0);
		for (let column = columnFrom; column < rowFrom; column++) {
			const cell = start + (rows[column] ?? 0);
			weights[cell] = (weights[cell] ?? 0) + ofRow * (share[column] ?? 0);
		}
	}
}

/** Joins the two cells of each pair into a symmetric matrix, times a factor. */
export function foldPairsInPlace(weights: Float64Array, n: number, factor: number): void {
	for (let i = 0; i < n; i++) {
		weights[i * n + i] = 0;
		for (let j = 0; j < i; j++) {
			const sum = ((weights[i * n + j] ?? 0) + (weights[j * n + i] ?? 0)) * factor;
			weights[i * n + j] = sum;
			weights[j * n + i] = sum;
		}
	}
}
