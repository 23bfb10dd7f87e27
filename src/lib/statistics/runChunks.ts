import { identityArrangement, nextArrangementInPlace, shuffleInPlace } from './arrangements.ts';
import { emptyBlockSums, sumBlocksInPlace } from './blockSums.ts';
import type { PermutationDesign, PermutationStatistic } from './permutationDesign.ts';
import { randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { countInPlace, mergeTallies, newCounters, type Tally, tallyOf } from './tally.ts';

/** Shuffles drawn from one stream. Part of every published number: changing it changes all Monte Carlo results. */
export const CHUNK_SHUFFLES = 256;

/** Arrangements of an enumeration between two reports. */
const BATCH_ARRANGEMENTS = 4096;

/** Slopes are kept unless told otherwise: the figures draw them. */
export const DEFAULT_KEEP: readonly PermutationStatistic[] = ['slope', 'nodes-plain', 'nodes-nested'];

export type ChunkRun = {
	/** whole number in [0, 2^32) */
	readonly seed: number;
	readonly firstChunk: number;
	readonly chunkCount: number;
	/** shuffles of the whole test, which end within its last chunk */
	readonly shuffles: number;
	/** move species within the daughters of the root only */
	readonly within: boolean;
	/** statistics whose values are wanted, 8 bytes per shuffle each */
	readonly keep?: readonly PermutationStatistic[];
};

/** Chunks that a test of so many shuffles has. */
export function chunksOf(shuffles: number): number {
	return Math.ceil(shuffles / CHUNK_SHUFFLES);
}

/**
 * Draws and judges the shuffles of some chunks. Each chunk starts from the identity with its own stream, seeded by the
 * seed, the chunk's number and the question (free or within), so its result depends on nothing else. One stream serves
 * all statistics. Cost: each of the n(n-1)/2 pairs once per shuffle.
 */
export function runChunks(design: PermutationDesign, run: ChunkRun): Tally {
	const { seed, firstChunk, chunkCount, shuffles, within, keep = DEFAULT_KEEP } = run;
	const end = Math.min(shuffles, (firstChunk + chunkCount) * CHUNK_SHUFFLES);
	const arrangements = Math.max(0, end - firstChunk * CHUNK_SHUFFLES);
	const groups = within ? design.within : design.free;
	const counters = newCounters(design.functionals, arrangements, keep);
	const sums = emptyBlockSums(design.layout.pairs.length);
	for (let done = 0, chunk = firstChunk; done < arrangements; chunk++) {
		const stream = randomStream(seed, chunk, within ? STREAM_DOMAIN.within : STREAM_DOMAIN.free);
		const arrangement = identityArrangement(design.tipCount);
		const stop = Math.min(arrangements, done + CHUNK_SHUFFLES);
		for (; done < stop; done++) {
			for (const group of groups) shuffleInPlace(arrangement, stream, group);
			sumBlocksInPlace(sums, design, arrangement);
			countInPlace(counters, sums, done);
		}
	}
	return tallyOf(counters, firstChunk, arrangements);
}

export type Enumeration = { readonly within: boolean; readonly keep?: readonly PermutationStatistic[] };

/** All arrangements, the identity first, in batches that `mergeTallies` joins. */
export function* enumerateInBatches(design: PermutationDesign, { within, keep = DEFAULT_KEEP }: Enumeration): Generator<Tally> {
	const groups = within ? design.within : design.free;
	const arrangement = identityArrangement(design.tipCount);
	const sums = emptyBlockSums(design.layout.pairs.length);
	for (let batch = 0, more = true; more; batch++) {
		const counters = newCounters(design.functionals, BATCH_ARRANGEMENTS, keep);
		let done = 0;
		while (more && done < BATCH_ARRANGEMENTS) {
			sumBlocksInPlace(sums, design, arrangement);
			countInPlace(counters, sums, done++);
			more = nextArrangementInPlace(arrangement, groups);
		}
		yield tallyOf(counters, batch, done);
	}
}

/** The exact null: n! arrangements, or within the deepest split the product of the sides' factorials. */
export function enumerate(design: PermutationDesign, enumeration: Enumeration): Tally {
	return mergeTallies([...enumerateInBatches(design, enumeration)]);
}
