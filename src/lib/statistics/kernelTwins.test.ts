import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from './agedTree.ts';
import { arrangementValues } from './arrangementValues.ts';
import { identityArrangement, shuffleInPlace } from './arrangements.ts';
import { countingGrid } from './countingGrid.ts';
import { denseSumsOfBatch } from './denseSums.ts';
import { denseSumsByLoop } from './denseSumsByLoop.ts';
import { drawnOverlap, drawnTree } from './exampleTrees.ts';
import { functionalByLoop } from './functionals.ts';
import { nodeSumsOfBatch } from './nodeSums.ts';
import { nodeSumsByLoop } from './nodeSumsByLoop.ts';
import { pairBlocks } from './pairBlocks.ts';
import { preparePermutation } from './permutationDesign.ts';
import { randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { shuffleBatches } from './shuffleBatches.ts';

/* The compiled kernel against the plain loops it stands for: every bit, on trees of every shape. */

/** ((((A,B),C),D),…): every node parts one species from the rest. */
function ladder(tipCount: number): AgedTree {
	const nodes = 2 * tipCount - 1;
	const parent = Int32Array.from({ length: nodes }, (_, k) => (k === 0 ? -1 : k % 2 === 1 ? k - 1 : k - 2));
	const ages = Float64Array.from({ length: nodes }, (_, k) => (k % 2 === 1 || k === nodes - 1 ? 0 : nodes - k));
	return { parent, ages };
}

const shapes = [4, 5, 11, 64, 130].flatMap((n) => [
	{ name: `${n} species, pairs`, n, tree: drawnTree(n, randomStream(n, 1, 8)) },
	{ name: `${n} species, polytomies`, n, tree: drawnTree(n, randomStream(n, 2, 8), { polytomies: true }) },
	{ name: `${n} species, a ladder`, n, tree: ladder(n) }
]);
const drawnFor = (n: number) => drawnOverlap(n, randomStream(n, 3, 8), 6);
const question = (n: number, permutations: number) => ({
	tipCount: n,
	groups: [{ from: 0, to: n }],
	domain: STREAM_DOMAIN.free,
	seed: 11,
	permutations
});

describe('shuffles', () => {
	it('are the bits of the plain generator, in one group and in several', () => {
		const [n, seed, chunk] = [41, 3_000_000_000, 2];
		for (const groups of [
			[{ from: 0, to: n }],
			[
				{ from: 2, to: 19 },
				{ from: 19, to: 40 }
			]
		]) {
			const asked = { ...question(n, 700), seed, domain: STREAM_DOMAIN.within, groups };
			const [batch] = shuffleBatches(asked, { firstChunk: chunk, chunkCount: 1 });
			const stream = randomStream(seed, chunk, STREAM_DOMAIN.within);
			const arrangement = identityArrangement(n);
			expect(batch?.count).toBe(700 - 512);
			for (let row = 0; row < (batch?.count ?? 0); row++) {
				for (const group of groups) shuffleInPlace(arrangement, stream, group);
				expect(batch?.arrangements.slice(row * n, (row + 1) * n)).toEqual(arrangement);
			}
		}
	});
});

describe('nodeSumsOfBatch', () => {
	it.each(shapes)('gives the bits of the plain loop: $name', ({ n, tree }) => {
		const layout = pairBlocks(treeShape(tree));
		const input = { layout, overlap: drawnFor(n), tipCount: n };
		const slots = layout.pairs.length;
		for (const batch of shuffleBatches(question(n, 24))) {
			const sums = nodeSumsOfBatch(input, batch);
			for (let row = 0; row < Math.min(24, batch.count); row++) {
				const alone = nodeSumsByLoop(input, batch.arrangements.subarray(row * n, (row + 1) * n));
				expect(sums.plain.subarray(row * slots, (row + 1) * slots)).toEqual(alone.plain);
				expect(sums.nested.subarray(row * slots, (row + 1) * slots)).toEqual(alone.nested);
			}
		}
	});

	it('gives the bits of the plain loop on 2,000 species, and on few again after them', () => {
		for (const n of [2_000, 7]) {
			const layout = pairBlocks(treeShape(drawnTree(n, randomStream(n, 4, 8), { polytomies: true })));
			const input = { layout, overlap: drawnFor(n), tipCount: n };
			const arrangement = identityArrangement(n);
			shuffleInPlace(arrangement, randomStream(n, 5, 8), { from: 0, to: n });
			expect(nodeSumsOfBatch(input, { count: 1, arrangements: arrangement })).toEqual(nodeSumsByLoop(input, arrangement));
		}
	});
});

describe('denseSumsOfBatch', () => {
	it.each([4, 5, 6, 7, 33, 130])('gives the bits of the plain loop: %i species', (n) => {
		const input = { cells: drawnFor(n), weights: drawnOverlap(n, randomStream(n, 6, 8), 9), tipCount: n };
		for (const batch of shuffleBatches(question(n, 20))) {
			const sums = denseSumsOfBatch(input, batch);
			for (let row = 0; row < batch.count; row++) {
				expect(sums[row]).toBe(denseSumsByLoop(input, batch.arrangements.subarray(row * n, (row + 1) * n)));
			}
		}
	});
});

describe('arrangementValues', () => {
	const plainOnly = (tree: AgedTree, overlap: Float64Array) => {
		const design = preparePermutation({ tree, overlap });
		const functionals = design.functionals.filter(({ source }) => source !== 'nested');
		return { design, functionals };
	};

	it.each(shapes)('takes the shorter way to the same values, within its own slack: $name', ({ n, tree }) => {
		const { design, functionals } = plainOnly(tree, drawnFor(n));
		const values = arrangementValues(design, { functionals, groups: design.free, capacity: 32 });
		values.draw({ domain: STREAM_DOMAIN.free, seed: 5, chunk: 0 }, 32);
		const columns = values.columns(32);
		expect(columns).toHaveLength(functionals.length);
		for (const { functional, slack, values: all, from, step } of columns) {
			for (let index = 0; index < 32; index++) {
				const byLoop = functionalByLoop(design, functional, values.arrangement(index));
				expect(Math.abs((all[from + index * step] ?? Number.NaN) - byLoop)).toBeLessThanOrEqual(slack);
			}
			// Small enough to be of use: far below the spread of the null, which is about the size of the weights.
			expect(slack).toBeLessThan(1e-8 * Math.max(...functional.weights.map(Math.abs)) * n * n);
		}
	});

	it('gives nested averages and all that goes with them to the last bit', () => {
		const { tree, n } = shapes[7] ?? { tree: ladder(11), n: 11 };
		const design = preparePermutation({ tree, overlap: drawnFor(n), statistics: ['slope-log-age'] });
		const { functionals, free } = design;
		const values = arrangementValues(design, { functionals, groups: free, capacity: 16 });
		values.draw({ domain: STREAM_DOMAIN.free, seed: 5, chunk: 3 }, 16);
		for (const { functional, values: all, from, step } of values.columns(16)) {
			for (let index = 0; index < 16; index++) {
				expect(all[from + index * step]).toBe(functionalByLoop(design, functional, values.arrangement(index)));
			}
		}
	});
});

describe('countingGrid', () => {
	// By hand: 66 pairs fit 2^7, so the step is 2^(0 + 7 - 52) of values up to 1, and half of it is the slack.
	it('is as fine as sums of all pairs allow', () => {
		const values = drawnOverlap(12, randomStream(1, 7, 8), 9);
		const grid = countingGrid(values, 12);
		expect(grid.slack).toBe(2 ** -46);
		for (const [cell, value] of grid.values.entries())
			expect(Math.abs(value - (values[cell] ?? 0))).toBeLessThanOrEqual(2 ** -46);
		expect([...grid.values].every((value) => Number.isInteger(value * 2 ** 45))).toBe(true);
	});

	// 1,999,000 pairs fit 2^21.
	it('is no coarser than 2^-31 for 2,000 species', () => {
		expect(countingGrid(new Float64Array(4_000_000).fill(1), 2_000).slack).toBe(2 ** -32);
	});

	it('follows the size of the values', () => {
		expect(countingGrid(Float64Array.of(0, 700, 700, 0), 2).slack).toBe(2 ** (10 - 52 - 1));
	});
});
