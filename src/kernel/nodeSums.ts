/** What `nodeSums` reads. Fields stand in memory in this order, four bytes each; the caller writes them so. */
@unmanaged
export class NodeSumsTask {
	/** shape (n, n) of f64 */
	matrix: usize;
	/** shape (count, n) of i32 */
	arrangements: usize;
	count: i32;
	tipCount: i32;
	/** shape (blocks, 5) of i32: slot, rowFrom, rowTo, columnFrom, columnTo */
	blocks: usize;
	blockCount: i32;
	/** nested weights, f64; of the tip at a position: weights + 8 * (weightShift[slot] + position) */
	weights: usize;
	/** shape (slots,) of i32 */
	weightShift: usize;
	/** shape (slots,) of f64 */
	childPairWeight: usize;
	slots: i32;
	/** out: shape (count, slots) of f64 */
	plain: usize;
	/** out: shape (count, slots) of f64 */
	nested: usize;
	/** scratch: shape (n,) of i32 */
	offsets: usize;
}

/** Plain and nested sums of one block, left here by the functions below: two results without a place in memory. */
let plainSum: f64 = 0;
let nestedSum: f64 = 0;

/** Sums by node of each arrangement, in the order of additions of `nodeSumsByLoop`. */
export function nodeSums(task: NodeSumsTask): void {
	const slotBytes: usize = (<usize>task.slots) << 3;
	memory.fill(task.plain, 0, <usize>task.count * slotBytes);
	memory.fill(task.nested, 0, <usize>task.count * slotBytes);
	for (let k = 0; k < task.count; k++) {
		const arrangement = task.arrangements + ((<usize>k * <usize>task.tipCount) << 2);
		cellOffsets(task.offsets, arrangement, task.tipCount);
		sumsOfArrangement(task, task.plain + <usize>k * slotBytes, task.nested + <usize>k * slotBytes);
	}
}

/** Bytes from the start of a row of the matrix to the cell of each position. */
export function cellOffsets(offsets: usize, arrangement: usize, tipCount: i32): void {
	const end = offsets + ((<usize>tipCount) << 2);
	for (let at = offsets; at < end; at += 4, arrangement += 4) store<i32>(at, load<i32>(arrangement) << 3);
}

function sumsOfArrangement(task: NodeSumsTask, plain: usize, nested: usize): void {
	const end = task.blocks + <usize>task.blockCount * 20;
	for (let block = task.blocks; block < end; block += 20) {
		const slot = <usize>load<i32>(block);
		const weights = task.weights + ((<isize>load<i32>(task.weightShift + (slot << 2))) << 3);
		plainSum = 0;
		nestedSum = 0;
		sumBlock(task, block, weights);
		const at = slot << 3;
		store<f64>(plain + at, load<f64>(plain + at) + plainSum);
		store<f64>(nested + at, load<f64>(nested + at) + nestedSum * load<f64>(task.childPairWeight + at));
	}
}

/** Rows in fours, which share each load of a column; then the rows left over. */
function sumBlock(task: NodeSumsTask, block: usize, weights: usize): void {
	const tips = <usize>task.tipCount;
	const offsets = task.offsets;
	const rowTo = <usize>load<i32>(block, 8);
	const from = <usize>load<i32>(block, 12);
	const to = <usize>load<i32>(block, 16);
	let row = <usize>load<i32>(block, 4);
	for (; row + 4 <= rowTo; row += 4) {
		const at = offsets + (row << 2);
		const x0 = task.matrix + <usize>load<i32>(at) * tips;
		const x1 = task.matrix + <usize>load<i32>(at, 4) * tips;
		const x2 = task.matrix + <usize>load<i32>(at, 8) * tips;
		const x3 = task.matrix + <usize>load<i32>(at, 12) * tips;
		sumFourRows(x0, x1, x2, x3, offsets + (from << 2), offsets + (to << 2), weights + (from << 3), weights + (row << 3));
	}
	for (; row < rowTo; row++) {
		const x = task.matrix + <usize>load<i32>(offsets + (row << 2)) * tips;
		sumRow(x, offsets + (from << 2), offsets + (to << 2), weights + (from << 3), load<f64>(weights + (row << 3)));
	}
}

function sumFourRows(
	x0: usize,
	x1: usize,
	x2: usize,
	x3: usize,
	column: usize,
	end: usize,
	weight: usize,
	rowWeights: usize
): void {
	let p01 = f64x2.splat(0);
	let p23 = f64x2.splat(0);
	let w01 = f64x2.splat(0);
	let w23 = f64x2.splat(0);
	for (; column < end; column += 4, weight += 8) {
		const cell = <usize>load<i32>(column);
		const w = v128.load_splat<f64>(weight);
		const a = v128.load_lane<f64>(x1 + cell, v128.load_zero<f64>(x0 + cell), 1);
		const b = v128.load_lane<f64>(x3 + cell, v128.load_zero<f64>(x2 + cell), 1);
		p01 = f64x2.add(p01, a);
		p23 = f64x2.add(p23, b);
		w01 = f64x2.add(w01, f64x2.mul(a, w));
		w23 = f64x2.add(w23, f64x2.mul(b, w));
	}
	plainSum += f64x2.extract_lane(p01, 0);
	plainSum += f64x2.extract_lane(p01, 1);
	plainSum += f64x2.extract_lane(p23, 0);
	plainSum += f64x2.extract_lane(p23, 1);
	nestedSum += f64x2.extract_lane(w01, 0) * load<f64>(rowWeights);
	nestedSum += f64x2.extract_lane(w01, 1) * load<f64>(rowWeights, 8);
	nestedSum += f64x2.extract_lane(w23, 0) * load<f64>(rowWeights, 16);
	nestedSum += f64x2.extract_lane(w23, 1) * load<f64>(rowWeights, 24);
}

/** One row, its columns dealt to four running sums: ladders consist of such rows, and one sum alone would wait for itself. */
function sumRow(x: usize, column: usize, end: usize, weight: usize, rowWeight: f64): void {
	let p01 = f64x2.splat(0);
	let p23 = f64x2.splat(0);
	let w01 = f64x2.splat(0);
	let w23 = f64x2.splat(0);
	for (; column + 16 <= end; column += 16, weight += 32) {
		const c0 = <usize>load<i32>(column);
		const c1 = <usize>load<i32>(column, 4);
		const c2 = <usize>load<i32>(column, 8);
		const c3 = <usize>load<i32>(column, 12);
		const a = v128.load_lane<f64>(x + c1, v128.load_zero<f64>(x + c0), 1);
		const b = v128.load_lane<f64>(x + c3, v128.load_zero<f64>(x + c2), 1);
		p01 = f64x2.add(p01, a);
		p23 = f64x2.add(p23, b);
		w01 = f64x2.add(w01, f64x2.mul(a, v128.load(weight)));
		w23 = f64x2.add(w23, f64x2.mul(b, v128.load(weight, 16)));
	}
	let p0 = f64x2.extract_lane(p01, 0);
	let p1 = f64x2.extract_lane(p01, 1);
	let p2 = f64x2.extract_lane(p23, 0);
	let w0 = f64x2.extract_lane(w01, 0);
	let w1 = f64x2.extract_lane(w01, 1);
	let w2 = f64x2.extract_lane(w23, 0);
	if (column < end) {
		const value = load<f64>(x + <usize>load<i32>(column));
		p0 += value;
		w0 += value * load<f64>(weight);
	}
	if (column + 4 < end) {
		const value = load<f64>(x + <usize>load<i32>(column, 4));
		p1 += value;
		w1 += value * load<f64>(weight, 8);
	}
	if (column + 8 < end) {
		const value = load<f64>(x + <usize>load<i32>(column, 8));
		p2 += value;
		w2 += value * load<f64>(weight, 16);
	}
	plainSum += p0 + p1 + (p2 + f64x2.extract_lane(p23, 1));
	nestedSum += (w0 + w1 + (w2 + f64x2.extract_lane(w23, 1))) * rowWeight;
}
