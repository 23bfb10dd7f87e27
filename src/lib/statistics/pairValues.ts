/** The strict lower triangle of a row-major (n, n) matrix, row by row: (1,0), (2,0), (2,1), … */
export function lowerTriangle(values: Float64Array, count: number): Float64Array {
	const lower = new Float64Array((count * (count - 1)) / 2);
	let pair = 0;
	for (let i = 1; i < count; i++) for (let j = 0; j < i; j++) lower[pair++] = values[i * count + j] ?? Number.NaN;
	return lower;
}

/** The symmetric matrix with the lower triangle given row by row, and `diagonal` on its diagonal. */
export function symmetricMatrix(lower: ArrayLike<number>, count: number, diagonal: number): Float64Array {
	const values = new Float64Array(count * count).fill(diagonal);
	let pair = 0;
	for (let i = 1; i < count; i++) {
		for (let j = 0; j < i; j++) {
			const value = lower[pair++] ?? Number.NaN;
			values[i * count + j] = value;
			values[j * count + i] = value;
		}
	}
	return values;
}
