import { describe, expect, it } from 'vitest';
import type { AgedTree } from './agedTree.ts';
import { identityArrangement } from './arrangements.ts';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from './exampleTrees.ts';
import { symmetricMatrix } from './pairValues.ts';
import { type PermutationDesign, preparePermutation } from './permutationDesign.ts';
import { randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { enumerate, runChunks } from './runChunks.ts';
import { shuffleBatches } from './shuffleBatches.ts';
import type { TailCounts } from './tally.ts';

/*
 * The rule, by the plainest loop there is: z = sum of overlap times age over pairs, and an arrangement counts in a tail
 * unless it is beyond 1e-10 times the sum of |overlap times age| on the other side.
 */
function countsByTheRule(ages: Float64Array, overlap: Float64Array, asked: { permutations: number; seed: number }): TailCounts {
	const n = Math.round(Math.sqrt(overlap.length));
	const z = (arrangement: Int32Array, of: (product: number) => number) => {
		let sum = 0;
		for (let i = 1; i < n; i++) {
			for (let j = 0; j < i; j++) {
				sum += of((overlap[(arrangement[i] ?? 0) * n + (arrangement[j] ?? 0)] ?? 0) * (ages[i * n + j] ?? 0));
			}
		}
		return sum;
	};
	const same = (product: number) => product;
	const observed = z(identityArrangement(n), same);
	const tie = 1e-10 * z(identityArrangement(n), Math.abs);
	let [less, greater] = [0, 0];
	for (const { count, arrangements } of shuffleBatches({
		...asked,
		tipCount: n,
		groups: [{ from: 0, to: n }],
		domain: STREAM_DOMAIN.free
	})) {
		for (let row = 0; row < count; row++) {
			const value = z(arrangements.subarray(row * n, (row + 1) * n), same);
			if (value - observed <= tie) less++;
			if (observed - value <= tie) greater++;
		}
	}
	return { less, greater };
}

const bothWays = (design: PermutationDesign, shuffles: number, seed: number) => {
	// With node averages every node is summed; the slope alone takes the shorter way on the grid.
	const run = { seed, firstChunk: 0, chunkCount: Math.ceil(shuffles / 256), shuffles, within: false, keep: [] };
	return [runChunks(design, run), runChunks(design, { ...run, statistics: ['slope'] })].map(({ counts }) => counts.slope);
};

describe('counts of shuffles', () => {
	// By hand: 0.4 + 0.8 and 0.7 + 0.5 are both 1.2, but not to a computer; on the micro-example 2 of 24 fall as steeply.
	it('ties sums that only rounding tells apart, on both ways', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		const design = preparePermutation({ tree, overlap });
		const rule = countsByTheRule(pairAgeMatrix(tree), overlap, { permutations: 24, seed: 1 });
		expect(rule).toEqual({ less: 2, greater: 24 });
		expect(enumerate(design, { within: false }).counts.slope).toEqual(rule);
		expect(enumerate(design, { within: false, statistics: ['slope'] }).counts.slope).toEqual(rule);
	});

	it('are those of the rule for all 720 arrangements of six species with two decimals', () => {
		for (let data = 0; data < 60; data++) {
			const stream = randomStream(data, 0, 8);
			const [tree, overlap] = [drawnTree(6, stream, { polytomies: data % 3 === 0 }), drawnOverlap(6, stream, 1 + (data % 2))];
			const design = preparePermutation({ tree, overlap });
			const rule = countsByTheRule(pairAgeMatrix(tree), overlap, { permutations: 720, seed: 1 });
			expect(enumerate(design, { within: false }).counts.slope).toEqual(rule);
			expect(enumerate(design, { within: false, statistics: ['slope'] }).counts.slope).toEqual(rule);
		}
	});

	// Overlaps of 0 or 1 and one decimal: many shuffles tie with the observed arrangement, or nearly.
	it('are those of the rule for many random shuffles', () => {
		for (let data = 0; data < 40; data++) {
			const stream = randomStream(data, 1, 8);
			const n = 9 + (data % 17);
			const tree = drawnTree(n, stream, { polytomies: data % 2 === 0 });
			const overlap = drawnOverlap(n, stream, data % 4);
			const design = preparePermutation({ tree, overlap });
			const rule = countsByTheRule(pairAgeMatrix(tree), overlap, { permutations: 600, seed: data });
			for (const counts of bothWays(design, 600, data)) expect(counts).toEqual(rule);
		}
	});

	// Cherries of one age side by side and overlaps of two values: more than one shuffle in twenty ties exactly.
	it('are those of the rule where many shuffles tie', () => {
		const text = '(((A:1,B:1):1,(C:1,D:1):1):1,((E:1,F:1):1,(G:1,H:1):1):1,(I:2,J:2):1);';
		const tree: AgedTree = exampleTree(text);
		const overlap = drawnOverlap(10, randomStream(3, 2, 8), 0);
		const rule = countsByTheRule(pairAgeMatrix(tree), overlap, { permutations: 2000, seed: 4 });
		expect(rule.less + rule.greater - 2000).toBeGreaterThan(100);
		for (const counts of bothWays(preparePermutation({ tree, overlap }), 2000, 4)) expect(counts).toEqual(rule);
	});
});
