import type { PermutationStatistic } from '../functionals.ts';
import { LAID_BLOCK_WIDTH, type LaidTree } from './posteriorTree.ts';

type Scored = { readonly statistic: PermutationStatistic; readonly scores: Float64Array };

/**
 * Adds what one tree makes of every pair to a matrix of weights: the statistic of that tree is Σ weight · overlap. Each pair
 * is visited once and written to one of its two cells, (row, column) or (column, row); `foldPairsInPlace` joins the two.
 *
 * @param weights - shape (n, n), row-major, by row of the matrix; added to
 * @param scored - a statistic with its `nodeScores`
 */
export function addPairWeightsInPlace(weights: Float64Array, laid: LaidTree, { statistic, scores }: Scored): void {
	if (statistic === 'nodes-nested') return addNestedInPlace(weights, laid, scores);
	const { tree, blocks, blockCount, pairs } = laid;
	const { rows } = tree;
	const n = rows.length;
	for (let block = 0; block < blockCount * LAID_BLOCK_WIDTH; block += LAID_BLOCK_WIDTH) {
		const slot = blocks[block] ?? 0;
		const rowFrom = blocks[block + 1] ?? 0;
		const rowTo = blocks[block + 2] ?? 0;
		const columnFrom = blocks[block + 3] ?? 0;
		const weight = (scores[slot] ?? 0) / (statistic === 'nodes-plain' ? (pairs[slot] ?? 1) : 1);
		for (let row = rowFrom; row < rowTo; row++) {
			const start = (rows[row] ?? 0) * n;
			for (let column = columnFrom; column < rowFrom; column++) {
				const cell = start + (rows[column] ?? 0);
				weights[cell] = (weights[cell] ?? 0) + weight;
			}
		}
	}
}

/**
 * Nested: 2/(q (q - 1)) at the node, times 1/(number of children) over the nodes strictly below it on both paths. `share`
 * holds those products for the tips below the node being visited; nodes come before their parents.
 */
function addNestedInPlace(weights: Float64Array, laid: LaidTree, scores: Float64Array): void {
	const { tree, internalCount, nodeOf, childCount, blockTo, blocks, tipFrom, tipTo } = laid;
	const { rows } = tree;
	const n = rows.length;
	const share = new Float64Array(n).fill(1);
	const ofColumn = new Float64Array(n);
	for (let slot = internalCount - 1; slot >= 0; slot--) {
		const node = nodeOf[slot] ?? 0;
		const q = childCount[slot] ?? 0;
		const from = tipFrom[node] ?? 0;
		const to = tipTo[node] ?? 0;
		const weight = ((scores[slot] ?? 0) * 2) / (q * (q - 1));
		for (let tip = from; tip < to; tip++) ofColumn[tip] = weight * (share[tip] ?? 0);
		for (let block = (blockTo[slot] ?? 0) - q + 1; block < (blockTo[slot] ?? 0); block++) {
			const rowFrom = blocks[block * LAID_BLOCK_WIDTH + 1] ?? 0;
			const rowTo = blocks[block * LAID_BLOCK_WIDTH + 2] ?? 0;
			for (let row = rowFrom; row < rowTo; row++) {
				const start = (rows[row] ?? 0) * n;
				const ofRow = share[row] ?? 0;
				addRowInPlace(weights, rows, { start, from, to: rowFrom, ofRow, ofColumn });
			}
		}
		for (let tip = from; tip < to; tip++) share[tip] = (share[tip] ?? 0) / q;
	}
}

type Row = {
	readonly start: number;
	readonly from: number;
	readonly to: number;
	readonly ofRow: number;
	readonly ofColumn: Float64Array;
};

function addRowInPlace(weights: Float64Array, rows: Int32Array, { start, from, to, ofRow, ofColumn }: Row): void {
	for (let column = from; column < to; column++) {
		const cell = start + (rows[column] ?? 0);
		weights[cell] = (weights[cell] ?? 0) + ofRow * (ofColumn[column] ?? 0);
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
