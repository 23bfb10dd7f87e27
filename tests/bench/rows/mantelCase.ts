import { treeShape } from '#lib/statistics/agedTree.ts';
import { drawnOverlap, drawnTree, pairAgeMatrix } from '#lib/statistics/exampleTrees.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';
import { chunksOf, runChunks } from '#lib/statistics/runChunks.ts';

/** A random tree and matrix of so many species, the same in every run. */
export function mantelCase(n: number) {
	const stream = randomStream(n, 0, 8);
	const tree = drawnTree(n, stream);
	const overlap = drawnOverlap(n, stream, 6);
	const design = preparePermutation({ tree, overlap, statistics: ['slope'] });
	return { tree, shape: treeShape(tree), overlap, ages: pairAgeMatrix(tree), design };
}

type Counted = { readonly design: ReturnType<typeof mantelCase>['design']; readonly shuffles: number; readonly seed: number };

/** Mantel's test alone, as the question within the deepest split asks it: the slope, no node averages. */
export function countSlope({ design, shuffles, seed }: Counted): void {
	const run = { seed, firstChunk: 0, chunkCount: chunksOf(shuffles), shuffles, within: false, keep: [] };
	runChunks(design, { ...run, statistics: ['slope'] });
}

/** Slope, and slope and intercept of plain and nested node averages. */
export function countNodes({ design, shuffles, seed }: Counted): void {
	runChunks(design, { seed, firstChunk: 0, chunkCount: chunksOf(shuffles), shuffles, within: false, keep: [] });
}
