import { cellOffsets } from './nodeSums';

/** What `blockForms` reads. Fields stand in memory in this order, four bytes each; the caller writes them so. */
@unmanaged
export class BlockFormsTask {
	/** shape (n, n) of f64, values on a grid on which every sum is exact */
	matrix: usize;
	/** shape (n,) of f64: sums of the rows of the matrix */
	rowSums: usize;
	/** shape (count, n) of i32 */
	arrangements: usize;
	count: i32;
	tipCount: i32;
	/** shape (n,) of i32: the positions in the order of the blocks, those with a weight of their own first */
	order: usize;
	/** shape (blocks, 4) of i32, in places of `order`: rowFrom, rowTo, columnFrom, columnTo */
	blocks: usize;
	blockCount: i32;
	/** positions with a weight of their own */
	ownCount: i32;
	/** number of forms */
	forms: i32;
	/** shape (forms, 1 + own + blocks) of f64: constant, weights of the row sums, weights of the blocks */
	weights: usize;
	/** out: shape (count, forms) of f64 */
	values: usize;
	/** scratch: shape (n,) of i32 */
	offsets: usize;
	/** scratch: shape (n,) of i32 */
	ordered: usize;
	/** scratch: shape (own + blocks,) of f64 */
	terms: usize;
}

/** The values of each form for each arrangement: constant + sum of weights times terms, terms in order. */
export function blockForms(task: BlockFormsTask): void {
	const tips = <usize>task.tipCount;
	for (let k = 0; k < task.count; k++) {
		const arrangement = task.arrangements + ((<usize>k * tips) << 2);
		for (let place: usize = 0; place < tips << 2; place += 4) {
			store<i32>(task.ordered + place, load<i32>(arrangement + ((<usize>load<i32>(task.order + place)) << 2)));
		}
		cellOffsets(task.offsets, task.ordered, task.tipCount);
		writeTerms(task);
		valuesOfForms(task, task.values + ((<usize>k * <usize>task.forms) << 3));
	}
}

function writeTerms(task: BlockFormsTask): void {
	let term = task.terms;
	for (let own = 0; own < task.ownCount; own++, term += 8) {
		store<f64>(term, load<f64>(task.rowSums + <usize>load<i32>(task.offsets + ((<usize>own) << 2))));
	}
	const end = task.blocks + ((<usize>task.blockCount) << 4);
	for (let block = task.blocks; block < end; block += 16, term += 8) store<f64>(term, blockSum(task, block));
}

function valuesOfForms(task: BlockFormsTask, values: usize): void {
	const termBytes = (<usize>(task.ownCount + task.blockCount)) << 3;
	let weight = task.weights;
	for (let form = 0; form < task.forms; form++, values += 8) {
		let value = load<f64>(weight);
		weight += 8;
		for (let at: usize = 0; at < termBytes; at += 8, weight += 8) value += load<f64>(weight) * load<f64>(task.terms + at);
		store<f64>(values, value);
	}
}

/** Rows in fours, which share each load of a column; the rows left over take four columns at a time. */
function blockSum(task: BlockFormsTask, block: usize): f64 {
	const tips = <usize>task.tipCount;
	const matrix = task.matrix;
	const rowTo = task.offsets + ((<usize>load<i32>(block, 4)) << 2);
	const from = task.offsets + ((<usize>load<i32>(block, 8)) << 2);
	const to = task.offsets + ((<usize>load<i32>(block, 12)) << 2);
	let row = task.offsets + ((<usize>load<i32>(block)) << 2);
	let s0: f64 = 0;
	let s1: f64 = 0;
	let s2: f64 = 0;
	let s3: f64 = 0;
	for (; row + 16 <= rowTo; row += 16) {
		const x0 = matrix + <usize>load<i32>(row) * tips;
		const x1 = matrix + <usize>load<i32>(row, 4) * tips;
		const x2 = matrix + <usize>load<i32>(row, 8) * tips;
		const x3 = matrix + <usize>load<i32>(row, 12) * tips;
		let column = from;
		for (; column + 8 <= to; column += 8) {
			const cell = <usize>load<i32>(column);
			const next = <usize>load<i32>(column, 4);
			s0 += load<f64>(x0 + cell);
			s1 += load<f64>(x1 + cell);
			s2 += load<f64>(x2 + cell);
			s3 += load<f64>(x3 + cell);
			s0 += load<f64>(x0 + next);
			s1 += load<f64>(x1 + next);
			s2 += load<f64>(x2 + next);
			s3 += load<f64>(x3 + next);
		}
		if (column < to) {
			const cell = <usize>load<i32>(column);
			s0 += load<f64>(x0 + cell);
			s1 += load<f64>(x1 + cell);
			s2 += load<f64>(x2 + cell);
			s3 += load<f64>(x3 + cell);
		}
	}
	for (; row < rowTo; row += 4) {
		const x = matrix + <usize>load<i32>(row) * tips;
		let column = from;
		for (; column + 16 <= to; column += 16) {
			s0 += load<f64>(x + <usize>load<i32>(column));
			s1 += load<f64>(x + <usize>load<i32>(column, 4));
			s2 += load<f64>(x + <usize>load<i32>(column, 8));
			s3 += load<f64>(x + <usize>load<i32>(column, 12));
		}
		for (; column < to; column += 4) s0 += load<f64>(x + <usize>load<i32>(column));
	}
	return s0 + s1 + (s2 + s3);
}
