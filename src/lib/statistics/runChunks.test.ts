import { describe, expect, it } from 'vitest';
import { drawnOverlap, drawnTree } from './exampleTrees.ts';
import { PERMUTATION_STATISTICS, preparePermutation } from './permutationDesign.ts';
import { randomStream } from './randomStream.ts';
import { chunksOf, enumerate, runChunks } from './runChunks.ts';
import { CHUNK_SHUFFLES } from './shuffleBatches.ts';
import { mergeTallies } from './tally.ts';

const stream = randomStream(77, 0, 8);
const design = preparePermutation({ tree: drawnTree(14, stream), overlap: drawnOverlap(14, stream) });
const shuffles = 8 * CHUNK_SHUFFLES - 49;
const keep = PERMUTATION_STATISTICS;

describe('runChunks', () => {
	it.each([false, true])('gives the same bits in one batch and in eight, in any order (within: %s)', (within) => {
		const whole = runChunks(design, { seed: 5, firstChunk: 0, chunkCount: chunksOf(shuffles), shuffles, within, keep });
		const parts = [3, 0, 7, 1, 6, 2, 5, 4].map((firstChunk) =>
			runChunks(design, { seed: 5, firstChunk, chunkCount: 1, shuffles, within, keep })
		);
		expect(mergeTallies(parts)).toEqual(whole);
		expect(whole.arrangements).toBe(shuffles);
	});

	it('draws longer tests by adding chunks, not by drawing anew', () => {
		const short = runChunks(design, { seed: 5, firstChunk: 0, chunkCount: 1, shuffles: 100, within: false });
		const long = runChunks(design, { seed: 5, firstChunk: 0, chunkCount: 8, shuffles, within: false });
		expect([...(short.values.slope ?? [])]).toEqual([...(long.values.slope ?? []).slice(0, 100)]);
	});

	it('draws other shuffles for another seed, and for the question within the deepest split', () => {
		const run = { seed: 5, firstChunk: 0, chunkCount: 1, shuffles: 20, within: false };
		const slopes = [run, { ...run, seed: 6 }, { ...run, within: true }].map((each) =>
			runChunks(design, each).values.slope?.join()
		);
		expect(new Set(slopes).size).toBe(3);
	});

	// With one group of all positions for both questions, only the streams can tell them apart.
	it('asks within the deepest split with streams of its own', () => {
		const alike = { ...design, within: design.free };
		const run = { seed: 5, firstChunk: 0, chunkCount: 1, shuffles: 20, within: false };
		const inside = runChunks(alike, { ...run, within: true });
		expect(inside.values.slope).not.toEqual(runChunks(alike, run).values.slope);
	});

	it('keeps the values it was asked for and no others', () => {
		const { values } = runChunks(design, {
			seed: 1,
			firstChunk: 0,
			chunkCount: 1,
			shuffles: 9,
			within: false,
			keep: ['spearman']
		});
		expect(Object.keys(values)).toEqual(['spearman']);
		expect(values.spearman?.length).toBe(9);
	});

	it('runs nothing beyond the last shuffle', () => {
		expect(runChunks(design, { seed: 1, firstChunk: 9, chunkCount: 3, shuffles, within: false }).arrangements).toBe(0);
	});
});

describe('enumerate', () => {
	// By hand: 8! = 40,320, in ten batches; E*[slope] = 0 because mean overlap and mean age do not change.
	it('visits n! arrangements whose slopes average 0', () => {
		const eight = preparePermutation({ tree: drawnTree(8, stream), overlap: drawnOverlap(8, stream) });
		const { arrangements, values } = enumerate(eight, { within: false, keep });
		expect(arrangements).toBe(40_320);
		for (const statistic of PERMUTATION_STATISTICS) {
			const all = values[statistic] ?? new Float64Array(0);
			const mean = all.reduce((sum, value) => sum + value, 0) / arrangements;
			expect(all.length).toBe(arrangements);
			expect(Math.abs(mean)).toBeLessThan(1e-12);
		}
	});
});
