/**
 * @param values - shape (n, n), row-major
 * @returns one array a row, as JSON sends a matrix
 */
export function squareRows(values: Float64Array, n: number): number[][] {
	return Array.from({ length: n }, (_, row) => Array.from(values.subarray(row * n, (row + 1) * n)));
}
