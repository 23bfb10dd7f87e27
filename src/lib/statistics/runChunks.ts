import { arrangementValues, type ArrangementValues } from './arrangementValues.ts';
import type { CountedStatistic, Functional } from './functionals.ts';
import { functionalByLoop } from './functionals.ts';
import type { PermutationDesign } from './permutationDesign.ts';
import { STREAM_DOMAIN } from './randomStream.ts';
import { BATCH_ARRANGEMENTS, CHUNK_SHUFFLES, enumeratedBatches } from './shuffleBatches.ts';
import { type Counter, countInPlace, mergeTallies, newCounters, type Tally, tallyOf } from './tally.ts';

/** Slopes are kept unless told otherwise: the figures draw them. */
export const DEFAULT_KEEP: readonly CountedStatistic[] = ['slope', 'nodes-plain', 'nodes-nested'];

/** What is counted, and which values stay. */
type Wanted = {
	/** move species within the daughters of the root only */
	readonly within: boolean;
	/** statistics that are counted; all of the design unless told otherwise */
	readonly statistics?: readonly CountedStatistic[];
	/** statistics whose values are wanted, 8 bytes per shuffle each */
	readonly keep?: readonly CountedStatistic[];
};

export type ChunkRun = Wanted & {
	/** whole number in [0, 2^32) */
	readonly seed: number;
	readonly firstChunk: number;
	readonly chunkCount: number;
	/** shuffles of the whole test, which end within its last chunk */
	readonly shuffles: number;
};

/** Chunks that a test of so many shuffles has. */
export function chunksOf(shuffles: number): number {
	return Math.ceil(shuffles / CHUNK_SHUFFLES);
}

/** The tallies of some chunks, joined. */
export function runChunks(design: PermutationDesign, run: ChunkRun): Tally {
	const tallies = [...tallyChunks(design, run)];
	return tallies.length > 0 ? mergeTallies(tallies) : tallyOf(newCounters(countedOf(design, run), 0, []), run.firstChunk, 0);
}

/**
 * Draws and judges the shuffles of some chunks, one tally each. Each chunk starts from the identity with its own stream,
 * seeded by the seed, the chunk's number and the question (free or within), so its result depends on nothing else. One
 * stream serves all statistics. Cost: see `arrangementValues`.
 */
export function* tallyChunks(design: PermutationDesign, run: ChunkRun): Generator<Tally> {
	const { seed, firstChunk, chunkCount, shuffles, within, keep = DEFAULT_KEEP } = run;
	const domain = within ? STREAM_DOMAIN.within : STREAM_DOMAIN.free;
	const functionals = countedOf(design, run);
	const groups = within ? design.within : design.free;
	const values = arrangementValues(design, { functionals, groups, capacity: CHUNK_SHUFFLES });
	for (let chunk = firstChunk; chunk < firstChunk + chunkCount; chunk++) {
		const count = Math.min(CHUNK_SHUFFLES, shuffles - chunk * CHUNK_SHUFFLES);
		if (count <= 0) return;
		values.draw({ domain, seed, chunk }, count);
		const counters = newCounters(functionals, count, keep);
		countAllInPlace(counters, values, { design, count });
		yield tallyOf(counters, chunk, count);
	}
}

/** All arrangements, the identity first, in batches that `mergeTallies` joins. */
export function* enumerateInBatches(design: PermutationDesign, wanted: Wanted): Generator<Tally> {
	const { within, keep = DEFAULT_KEEP } = wanted;
	const functionals = countedOf(design, wanted);
	const groups = within ? design.within : design.free;
	const values = arrangementValues(design, { functionals, groups, capacity: BATCH_ARRANGEMENTS });
	let batch = 0;
	for (const { count, arrangements } of enumeratedBatches({ tipCount: design.tipCount, groups })) {
		values.take(arrangements);
		const counters = newCounters(functionals, count, keep);
		countAllInPlace(counters, values, { design, count });
		yield tallyOf(counters, batch++, count);
	}
}

/** The exact null: n! arrangements, or within the deepest split the product of the sides' factorials. */
export function enumerate(design: PermutationDesign, wanted: Wanted): Tally {
	return mergeTallies([...enumerateInBatches(design, wanted)]);
}

function countedOf({ functionals }: PermutationDesign, { statistics }: Wanted): readonly Functional[] {
	return statistics === undefined ? functionals : functionals.filter(({ statistic }) => statistics.includes(statistic));
}

function countAllInPlace(
	counters: readonly Counter[],
	values: ArrangementValues,
	{ design, count }: { readonly design: PermutationDesign; readonly count: number }
): void {
	const byLoop = (functional: Functional, index: number) => functionalByLoop(design, functional, values.arrangement(index));
	for (const column of values.columns(count)) {
		const counter = counters.find(({ functional }) => functional === column.functional);
		if (counter) countInPlace(counter, column, { count, first: 0, byLoop });
	}
}
