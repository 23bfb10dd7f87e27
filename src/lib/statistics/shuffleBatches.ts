import { arrangementCount, type Group, identityArrangement, nextArrangementInPlace } from './arrangements.ts';
import { kernelRegions } from './kernelRegions.ts';

/** Shuffles drawn from one stream. Part of every published number: changing it changes all Monte Carlo results. */
export const CHUNK_SHUFFLES = 256;

/** Arrangements of an enumeration handed over at once. */
export const BATCH_ARRANGEMENTS = 4096;

/** Up to 8 species (8! = 40,320) the null is always enumerated, however few shuffles were asked for. */
const ALWAYS_EXACT_SPECIES = 8;
const ALWAYS_EXACT_ARRANGEMENTS = 40_320;

/** Which arrangements a null distribution is made of. */
export type ShuffleQuestion = {
	readonly tipCount: number;
	/** positions among which species change places; the others stay */
	readonly groups: readonly Group[];
	/** see `STREAM_DOMAIN` */
	readonly domain: number;
	/** whole number in [0, 2^32) */
	readonly seed: number;
	/** m, at least 1 */
	readonly permutations: number;
};

/** Some arrangements of a question, in the order of its stream. */
export type ShuffleBatch = {
	/** index of the first arrangement among all of the question */
	readonly first: number;
	readonly count: number;
	/** shape (count, tips), row-major: the row of the matrix that stands at each tip position; valid until the next batch is taken */
	readonly arrangements: Int32Array;
};

/** Chunks of a random question: a share of them can be run anywhere, each depends on its own number only. */
export type ChunkShare = { readonly firstChunk: number; readonly chunkCount: number };

/** How many arrangements a question has, and whether they are all of them (the observed one first) or a sample. */
export function plannedArrangements({ groups, permutations }: Pick<ShuffleQuestion, 'groups' | 'permutations'>): {
	readonly exact: boolean;
	readonly count: number;
} {
	const all = arrangementCount(groups);
	const few = all <= ALWAYS_EXACT_ARRANGEMENTS && groups.every(({ from, to }) => to - from <= ALWAYS_EXACT_SPECIES);
	const exact = few || all <= permutations;
	return { exact, count: exact ? all : permutations };
}

/**
 * The arrangements of a question: all of them, the identity first, when they are few; else m random ones. Equal
 * questions give equal arrangements on any machine, and any share of the chunks gives its own part of the whole.
 */
export function* shuffleBatches(question: ShuffleQuestion, share?: ChunkShare): Generator<ShuffleBatch> {
	const { exact, count } = plannedArrangements(question);
	if (exact) yield* enumeratedBatches(question);
	else yield* drawnBatches(question, share ?? { firstChunk: 0, chunkCount: Math.ceil(count / CHUNK_SHUFFLES) });
}

/** Drawn by the compiled kernel, bit for bit as `shuffleInPlace` does with the stream of the chunk. */
function* drawnBatches(question: ShuffleQuestion, { firstChunk, chunkCount }: ChunkShare): Generator<ShuffleBatch> {
	const { tipCount, groups, seed, domain, permutations } = question;
	const arrangements = new Int32Array(CHUNK_SHUFFLES * tipCount);
	const regions = kernelRegions({
		drawn: arrangements.byteLength,
		groups: Int32Array.from(groups.flatMap(({ from, to }) => [from, to]))
	});
	const { address } = regions;
	for (let chunk = firstChunk; chunk < firstChunk + chunkCount; chunk++) {
		const first = chunk * CHUNK_SHUFFLES;
		const count = Math.min(CHUNK_SHUFFLES, permutations - first);
		if (count <= 0) return;
		// The fields of ShuffleTask in src/kernel.
		regions.run('shuffles', [address('drawn'), count, tipCount, address('groups'), groups.length, domain, seed, chunk]);
		const taken = arrangements.subarray(0, count * tipCount);
		taken.set(regions.integers('drawn', taken.length));
		yield { first, count, arrangements: taken };
	}
}

/** Every arrangement of the groups once, the identity first. */
export function* enumeratedBatches({ tipCount, groups }: Pick<ShuffleQuestion, 'tipCount' | 'groups'>): Generator<ShuffleBatch> {
	const arrangements = new Int32Array(BATCH_ARRANGEMENTS * tipCount);
	const arrangement = identityArrangement(tipCount);
	let first = 0;
	for (let more = true; more;) {
		let count = 0;
		while (more && count < BATCH_ARRANGEMENTS) {
			arrangements.set(arrangement, count++ * tipCount);
			more = nextArrangementInPlace(arrangement, groups);
		}
		yield { first, count, arrangements: arrangements.subarray(0, count * tipCount) };
		first += count;
	}
}
