import { cellOffsets } from './nodeSums';

/** What `denseSums` reads. Fields stand in memory in this order, four bytes each; the caller writes them so. */
@unmanaged
export class DenseSumsTask {
	/** shape (n, n) of f64: the matrix whose rows and columns move */
	matrix: usize;
	/** shape (n, n) of f64: the matrix that stays */
	weights: usize;
	/** shape (count, n) of i32 */
	arrangements: usize;
	count: i32;
	tipCount: i32;
	/** out: shape (count,) of f64 */
	sums: usize;
	/** scratch: shape (n,) of i32 */
	offsets: usize;
}

/** Sum over pairs of moved cell times weight, in the order of additions of `denseSumsByLoop`. */
export function denseSums(task: DenseSumsTask): void {
	for (let k = 0; k < task.count; k++) {
		const arrangement = task.arrangements + ((<usize>k * <usize>task.tipCount) << 2);
		cellOffsets(task.offsets, arrangement, task.tipCount);
		store<f64>(task.sums + ((<usize>k) << 3), denseSum(task));
	}
}

/** Rows in fours over the columns that all four have; the corner of the triangle and the last rows follow one by one. */
function denseSum(task: DenseSumsTask): f64 {
	const tips = <usize>task.tipCount;
	let total: f64 = 0;
	let row: usize = 0;
	for (; row + 4 <= tips; row += 4) {
		const at = task.offsets + (row << 2);
		const x0 = task.matrix + <usize>load<i32>(at) * tips;
		const x1 = task.matrix + <usize>load<i32>(at, 4) * tips;
		const x2 = task.matrix + <usize>load<i32>(at, 8) * tips;
		const x3 = task.matrix + <usize>load<i32>(at, 12) * tips;
		const rowBytes = tips << 3;
		let weight = task.weights + row * rowBytes;
		let s01 = f64x2.splat(0);
		let s23 = f64x2.splat(0);
		for (let column = task.offsets; column < at; column += 4, weight += 8) {
			const cell = <usize>load<i32>(column);
			const a = v128.load_lane<f64>(x1 + cell, v128.load_zero<f64>(x0 + cell), 1);
			const b = v128.load_lane<f64>(x3 + cell, v128.load_zero<f64>(x2 + cell), 1);
			const second = weight + rowBytes;
			const third = second + rowBytes;
			const v = v128.load_lane<f64>(second, v128.load_zero<f64>(weight), 1);
			const w = v128.load_lane<f64>(third + rowBytes, v128.load_zero<f64>(third), 1);
			s01 = f64x2.add(s01, f64x2.mul(a, v));
			s23 = f64x2.add(s23, f64x2.mul(b, w));
		}
		weight += rowBytes;
		total += f64x2.extract_lane(s01, 0);
		total += rowEnd(f64x2.extract_lane(s01, 1), x1, weight, at, 1);
		total += rowEnd(f64x2.extract_lane(s23, 0), x2, weight + rowBytes, at, 2);
		total += rowEnd(f64x2.extract_lane(s23, 1), x3, weight + (rowBytes << 1), at, 3);
	}
	for (; row < tips; row++) {
		const x = task.matrix + <usize>load<i32>(task.offsets + (row << 2)) * tips;
		total += rowEnd(0, x, task.weights + ((row * tips) << 3), task.offsets, row);
	}
	return total;
}

/** Adds the next `count` columns of one row to its running sum. */
function rowEnd(sum: f64, x: usize, weight: usize, column: usize, count: usize): f64 {
	const end = column + (count << 2);
	for (; column < end; column += 4, weight += 8) sum += load<f64>(x + <usize>load<i32>(column)) * load<f64>(weight);
	return sum;
}
