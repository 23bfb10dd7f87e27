import type { DenseSumsInput } from './denseSums.ts';

/**
 * The dense sum of one arrangement by a plain double loop: the reference of the compiled kernel, which must give the
 * same bits. One running sum per row, columns upwards; then the rows upwards.
 *
 * @param arrangement - shape (n,); the row of the matrix that stands at each tip position
 */
export function denseSumsByLoop({ cells, weights, tipCount }: DenseSumsInput, arrangement: Int32Array): number {
	let total = 0;
	for (let row = 1; row < tipCount; row++) {
		const moved = (arrangement[row] ?? 0) * tipCount;
		let sum = 0;
		for (let column = 0; column < row; column++) {
			sum += (cells[moved + (arrangement[column] ?? 0)] ?? 0) * (weights[row * tipCount + column] ?? 0);
		}
		total += sum;
	}
	return total;
}
