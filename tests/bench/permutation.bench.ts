import { bench, describe } from 'vitest';
import { drawnOverlap, drawnTree, pairAgeMatrix } from '#lib/statistics/exampleTrees.ts';
import { mantelTest } from '#lib/statistics/mantelTest.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';
import { runChunks } from '#lib/statistics/runChunks.ts';

/*
 * Read the ratio of a group, not its times: both sides draw the same shuffles in the same process. The plain loop counts
 * two statistics, the kernel all of them, slope and intercept of node averages and ranks included.
 */
const SHUFFLES = 1024;

for (const n of [20, 50, 100, 200]) {
	const stream = randomStream(n, 0, 8);
	const tree = drawnTree(n, stream);
	const overlap = drawnOverlap(n, stream, 6);
	const ages = pairAgeMatrix(tree);
	const design = preparePermutation({ tree, overlap });
	const run = { seed: 1, firstChunk: 0, chunkCount: SHUFFLES / 256, shuffles: SHUFFLES };

	describe(`${SHUFFLES} shuffles of ${n} species`, () => {
		bench('kernel, all statistics', () => {
			runChunks(design, { ...run, within: false });
		});
		bench('kernel, all statistics, within the deepest split', () => {
			runChunks(design, { ...run, within: true });
		});
		bench('plain double loop, two statistics', () => {
			mantelTest(ages, overlap, { permutations: SHUFFLES, seed: 1 });
		});
	});
}
