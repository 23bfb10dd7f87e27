import { FORM_BLOCK_WIDTH } from './blockFormLayout.ts';
import { kernelRegions } from './kernelRegions.ts';
import type { ShuffleBatch } from './shuffleBatches.ts';

/** Neighbouring positions, from `from` up to, not including, `to`. */
export type Run = { readonly from: number; readonly to: number };

export type RunSumsInput = {
	/** shape (n, n), row-major, symmetric; the diagonal is not read */
	readonly matrix: Float64Array;
	readonly tipCount: number;
	readonly runs: readonly Run[];
};

/**
 * The sum over the pairs inside each run of positions, for some arrangements, by the compiled kernel. A run is cut in
 * halves, and each half in its turn, so that its pairs lie in rectangles, which the kernel reads four rows at a time.
 *
 * @returns for a batch, shape (count, runs); a fresh array
 */
export function runSums({ matrix, tipCount, runs }: RunSumsInput): (batch: ShuffleBatch) => Float64Array {
	const blocksOf = runs.map((run) => rectangles(run));
	const blocks = Int32Array.from(blocksOf.flat());
	const blockCount = blocks.length / FORM_BLOCK_WIDTH;
	const weights = new Float64Array(runs.length * (1 + blockCount));
	let first = 0;
	for (const [form, own] of blocksOf.entries()) {
		const start = form * (1 + blockCount) + 1 + first;
		first += own.length / FORM_BLOCK_WIDTH;
		weights.fill(1, start, start + own.length / FORM_BLOCK_WIDTH);
	}
	const order = Int32Array.from({ length: tipCount }, (_, position) => position);
	return ({ count, arrangements }) => {
		const { address, run, doubles } = kernelRegions({
			matrix,
			arrangements: arrangements.subarray(0, count * tipCount),
			order,
			blocks,
			weights,
			values: 8 * count * runs.length,
			offsets: 4 * tipCount,
			ordered: 4 * tipCount,
			terms: 8 * blockCount
		});
		// The fields of BlockFormsTask in src/kernel; no position has a weight of its own, so no row sum is read.
		run('blockForms', [
			address('matrix'),
			0,
			address('arrangements'),
			count,
			tipCount,
			address('order'),
			address('blocks'),
			blockCount,
			0,
			runs.length,
			address('weights'),
			address('values'),
			address('offsets'),
			address('ordered'),
			address('terms')
		]);
		return doubles('values', count * runs.length).slice();
	};
}

/** Rows and columns of the rectangles that hold every pair of a run once: the shorter side are the rows. */
function rectangles({ from, to }: Run): number[] {
	if (to - from < 2) return [];
	const middle = from + Math.floor((to - from) / 2);
	return [from, middle, middle, to, ...rectangles({ from, to: middle }), ...rectangles({ from: middle, to })];
}
