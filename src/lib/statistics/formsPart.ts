import type { KernelPart, ValueColumn } from './arrangementValues.ts';
import { blockFormLayout, type BlockFormLayout, FORM_BLOCK_WIDTH, type FormWeights, formWeights } from './blockFormLayout.ts';
import { type CountingGrid, countingGrid } from './countingGrid.ts';
import { type Functional, ranksOf } from './functionals.ts';
import type { KernelRegions } from './kernelRegions.ts';
import type { PermutationDesign } from './permutationDesign.ts';

/** Half the distance between 1 and the next double: the largest relative error of one rounding. */
const ROUNDING = 2 ** -53;

/**
 * Functionals by the shorter way of `blockFormLayout`, on overlaps moved to a grid on which all sums of theirs are
 * exact. Ranks are whole halves, which are on their grid already. All functionals read the same matrix.
 */
export function formsPart(design: PermutationDesign, functionals: readonly Functional[], capacity: number): KernelPart {
	const { tipCount, layout } = design;
	const source = functionals[0]?.source === 'ranks' ? 'ranks' : 'overlap';
	const grid = countingGrid(source === 'ranks' ? ranksOf(design) : design.overlap, tipCount);
	const rowSums = sumsOfRows(grid.values, tipCount);
	const total = rowSums.reduce((sum, value) => sum + value, 0) / 2;
	const form = blockFormLayout(design.shape);
	const terms = form.leftAt.length + form.meeting.length;
	const weights = functionals.map((functional) => formWeights(form, functional.weights));
	const slack = functionals.map((functional, i) => {
		const own = weights[i];
		return own === undefined ? 0 : slackOf({ functional, weights: own, form, grid, pairs: layout.pairs });
	});
	const named = (name: string) => `${source} ${name}`;
	const evaluate = ({ address, run, doubles }: KernelRegions<string>, count: number): ValueColumn[] => {
		// The fields of BlockFormsTask in src/kernel.
		run('blockForms', [
			address(named('grid')),
			address(named('rowSums')),
			address('arrangements'),
			count,
			tipCount,
			address(named('order')),
			address(named('blocks')),
			form.meeting.length,
			form.leftAt.length,
			functionals.length,
			address(named('weights')),
			address(named('values')),
			address('offsets'),
			address(named('ordered')),
			address(named('terms'))
		]);
		const values = doubles(named('values'), count * functionals.length);
		return functionals.map((functional, from) => ({
			functional,
			slack: slack[from] ?? 0,
			values,
			from,
			step: functionals.length
		}));
	};
	return {
		parts: {
			[named('grid')]: grid.values,
			[named('rowSums')]: rowSums,
			[named('order')]: form.order,
			[named('blocks')]: form.blocks,
			[named('weights')]: Float64Array.from(weights.flatMap((w) => [w.constant * total, ...w.own, ...w.blocks])),
			[named('values')]: 8 * capacity * functionals.length,
			[named('ordered')]: 4 * tipCount,
			[named('terms')]: 8 * terms
		},
		evaluate
	};
}

/** Off the diagonal; exact, the values being on the grid. */
function sumsOfRows(values: Float64Array, tipCount: number): Float64Array {
	return Float64Array.from({ length: tipCount }, (_, row) => {
		let sum = 0;
		for (let column = 0; column < tipCount; column++) if (column !== row) sum += values[row * tipCount + column] ?? 0;
		return sum;
	});
}

type Slackness = {
	readonly functional: Functional;
	readonly weights: FormWeights;
	readonly form: BlockFormLayout;
	readonly grid: CountingGrid;
	/** shape (slots,) */
	readonly pairs: Float64Array;
};

/**
 * The most by which a value of the kernel may differ from that of the plain loop: every pair moved by the slack of the
 * grid, and the roundings of both ways, each bounded by the number of additions times the sum of the magnitudes.
 */
function slackOf({ functional, weights, form, grid, pairs }: Slackness): number {
	const tips = form.order.length;
	let atPairs = 0;
	for (const [slot, weight] of functional.weights.entries()) atPairs += Math.abs(weight) * (pairs[slot] ?? 0);
	let largestWeight = 0;
	for (const weight of functional.weights) largestWeight = Math.max(largestWeight, Math.abs(weight));
	// Each weight of the form is made of up to four of the functional's.
	let magnitude = (Math.abs(weights.constant) * tips * tips) / 2 + largestWeight * tips * tips;
	for (const own of weights.own) magnitude += (Math.abs(own) + 2 * largestWeight) * tips;
	for (let block = 0; block < form.meeting.length; block++) {
		magnitude += (Math.abs(weights.blocks[block] ?? 0) + 4 * largestWeight) * pairsOfBlock(form.blocks, block);
	}
	const additions = weights.own.length + weights.blocks.length + 2 * tips + pairs.length + 8;
	return grid.slack * atPairs + ROUNDING * additions * grid.largest * magnitude;
}

function pairsOfBlock(blocks: Int32Array, block: number): number {
	const [rowFrom = 0, rowTo = 0, columnFrom = 0, columnTo = 0] = blocks.subarray(block * FORM_BLOCK_WIDTH);
	return (rowTo - rowFrom) * (columnTo - columnFrom);
}
