import { InputError } from '#lib/remarks/inputError.ts';

/**
 * A symmetric species-by-species matrix. `values` is row-major, shape (n, n); a missing pair is NaN in both places.
 * Overlaps are similarities: 1 on the diagonal.
 */
export type PairMatrix = {
	readonly species: readonly string[];
	readonly values: Float64Array;
};

/** @returns the value of the pair (i, j); NaN when it is missing */
export function pairValue(matrix: PairMatrix, i: number, j: number): number {
	return matrix.values[i * matrix.species.length + j] ?? Number.NaN;
}

/**
 * The matrix of some of its species, in the order asked.
 * @throws {InputError} `unknown-species` when a name is not in the matrix
 */
export function selectSpecies(matrix: PairMatrix, species: readonly string[]): PairMatrix {
	const position = new Map(matrix.species.map((name, index) => [name, index]));
	const rows = species.map((name) => {
		const row = position.get(name);
		if (row === undefined)
			throw new InputError('unknown-species', `Expected "${name}" to be a species of the matrix; it is not there.`, { name });
		return row;
	});
	const values = new Float64Array(rows.length * rows.length);
	for (const [i, row] of rows.entries()) {
		for (const [j, column] of rows.entries()) values[i * rows.length + j] = pairValue(matrix, row, column);
	}
	return { species: [...species], values };
}
