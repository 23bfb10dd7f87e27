import type { LaidTree } from './posteriorTree.ts';

/**
 * What the pairs that meet at each node add up to.
 *
 * @param overlap - shape (n, n), row-major, by row of the matrix
 * @returns shape (internal nodes,)
 */
export function nodeSums(overlap: Float64Array, { tree, internal, tipFrom, tipTo, nodeTo }: LaidTree): Float64Array {
	const { rows } = tree;
	const n = rows.length;
	return Float64Array.from(internal, (node) => {
		let sum = 0;
		const columnFrom = tipFrom[node] ?? 0;
		for (let child = nodeTo[node + 1] ?? 0; child < (nodeTo[node] ?? 0); child = nodeTo[child] ?? 0) {
			const rowTo = tipTo[child] ?? 0;
			const rowFrom = tipFrom[child] ?? 0;
			for (let row = rowFrom; row < rowTo; row++) {
				const start = (rows[row] ?? 0) * n;
				for (let column = columnFrom; column < rowFrom; column++) sum += overlap[start + (rows[column] ?? 0)] ?? 0;
			}
		}
		return sum;
	});
}
