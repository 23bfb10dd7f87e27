import type { CountedStatistic, PermutationStatistic } from './functionals.ts';
import type { PermutationDesign } from './permutationDesign.ts';
import { permutationPValue, type TailProbabilities } from './permutationPValue.ts';
import { chunksOf, enumerateInBatches, tallyChunks } from './runChunks.ts';
import { type ChunkShare, plannedArrangements } from './shuffleBatches.ts';
import { addCounts, mergeTallies, type TailCounts, type Tally } from './tally.ts';

export type TestedStatistic = TailCounts & TailProbabilities & { readonly observed: number };

/** The null distribution of one question, and where the data stand in it. */
export type NullOutcome = {
	readonly exact: boolean;
	/** number of arrangements when exact (the observed one is among them), else m shuffles */
	readonly count: number;
	/** `slope-log-age` is absent where an internal node has age 0 */
	readonly statistics: Readonly<Partial<Record<CountedStatistic, TestedStatistic>>>;
	readonly values: Tally['values'];
};

export type PermutationOutcome = {
	readonly free: NullOutcome;
	/** null when no daughter of the root holds two species */
	readonly within: (NullOutcome & { readonly sides: readonly number[]; readonly rootPairShare: number }) | null;
};

export type PermutationProgress = {
	readonly question: 'free' | 'within';
	/** arrangements of both questions together */
	readonly done: number;
	readonly total: number;
	/** of the question being run, so far */
	readonly asked: { readonly done: number; readonly counts: Tally['counts'] };
	/** slopes over all pairs since the last call; empty while running within the deepest split */
	readonly newSlopes: Float64Array;
};

export type PermutationOptions = {
	/** m, at least 1 */
	readonly permutations: number;
	/** whole number in [0, 2^32) */
	readonly seed: number;
	/** statistics whose values are returned beside the slope's */
	readonly keep?: readonly PermutationStatistic[];
	/** statistics counted within the deepest split; all of the design unless told otherwise, fewer are faster */
	readonly withinStatistics?: readonly PermutationStatistic[];
	/** shares run before, together all chunks of the questions that they hold */
	readonly shares?: readonly SharedTallies[];
	/** called after every chunk or batch; it may throw to stop the test */
	readonly onProgress?: (progress: PermutationProgress) => void;
};

/** The chunks of one share of a test; null for a question that is enumerated or cannot be asked, which is not shared. */
export type SharedTallies = { readonly free: Tally | null; readonly within: Tally | null };

/**
 * Tests whether overlap goes with age, by moving species over the tips of the tree: freely, and again within the
 * daughters of the root only. Exact where the arrangements are no more than the shuffles asked for, and always up to 8
 * species; else Monte Carlo. Equal design, seed and number give equal bits.
 */
export function permutationTest(design: PermutationDesign, options: PermutationOptions): PermutationOutcome {
	const { shares = [], permutations } = options;
	const report = { done: arrangementsOf(shares), total: plannedTotal(design, permutations) };
	const free = askQuestion(design, false, { ...options, report });
	const within = design.within.length === 0 ? null : askQuestion(design, true, { ...options, report });
	return outcomeOf(design, permutations, { free, within });
}

/**
 * The part of a test that falls to some of its chunks, in both questions. Shares may be run anywhere and in any order;
 * given to `permutationTest` together they make the bits that it would make alone.
 */
export function tallyShare(design: PermutationDesign, share: ChunkShare, options: PermutationOptions): SharedTallies {
	const report = { done: 0, total: plannedTotal(design, options.permutations) };
	const ask = (within: boolean) =>
		isExact(design, within, options.permutations) ? null : askQuestion(design, within, { ...options, report, share });
	return { free: ask(false), within: design.within.length === 0 ? null : ask(true) };
}

/** The tallies of both questions, whoever ran them, read as p-values. */
export function outcomeOf(
	design: PermutationDesign,
	permutations: number,
	{ free, within }: { readonly free: Tally; readonly within: Tally | null }
): PermutationOutcome {
	const { sides, rootPairShare } = design;
	return {
		free: nullOutcome(design, free, isExact(design, false, permutations)),
		within: within && { ...nullOutcome(design, within, isExact(design, true, permutations)), sides, rootPairShare }
	};
}

/** Whether a question is enumerated. */
export function isExact(design: PermutationDesign, within: boolean, permutations: number): boolean {
	return plannedOf(design, within, permutations).exact;
}

/** Arrangements of both questions together. */
function plannedTotal(design: PermutationDesign, permutations: number): number {
	const within = design.within.length === 0 ? 0 : plannedOf(design, true, permutations).count;
	return plannedOf(design, false, permutations).count + within;
}

function plannedOf(design: PermutationDesign, within: boolean, permutations: number) {
	return plannedArrangements({ groups: within ? design.within : design.free, permutations });
}

/** A merged tally read as p-values, of the statistics that it counted. */
function nullOutcome(design: PermutationDesign, tally: Tally, exact: boolean): NullOutcome {
	const statistics: Partial<Record<CountedStatistic, TestedStatistic>> = {};
	for (const { statistic, observed } of design.functionals) {
		const counts = tally.counts[statistic];
		if (counts) statistics[statistic] = { observed, ...counts, ...permutationPValue(counts, tally.arrangements, exact) };
	}
	return { exact, count: tally.arrangements, statistics, values: tally.values };
}

type Asking = PermutationOptions & {
	readonly report: { done: number; readonly total: number };
	readonly share?: ChunkShare;
};

function askQuestion(design: PermutationDesign, within: boolean, asking: Asking): Tally {
	const { report, onProgress } = asking;
	const tallies: Tally[] = [];
	let counts: Tally['counts'] = {};
	let done = 0;
	const shared = sharedTallies(within, asking);
	for (const tally of shared ?? talliesOf(design, within, asking)) {
		tallies.push(tally);
		counts = addCounts([{ counts }, tally]);
		done += tally.arrangements;
		// What the shares have done was reported while they did it, and stands in the sum from the start.
		if (shared === null) report.done += tally.arrangements;
		onProgress?.({
			question: within ? 'within' : 'free',
			done: report.done,
			total: report.total,
			asked: { done, counts },
			newSlopes: tally.values.slope ?? new Float64Array(0)
		});
	}
	return mergeTallies(tallies);
}

function arrangementsOf(shares: readonly SharedTallies[]): number {
	return shares.reduce((sum, { free, within }) => sum + (free?.arrangements ?? 0) + (within?.arrangements ?? 0), 0);
}

/** The question's tallies of the shares as one; null where it was not shared. */
function sharedTallies(within: boolean, { shares = [] }: Asking): readonly Tally[] | null {
	const given = shares.flatMap(({ free, within: inside }) => (within ? inside : free) ?? []);
	return given.length > 0 ? [mergeTallies(given)] : null;
}

function talliesOf(design: PermutationDesign, within: boolean, options: Asking): Generator<Tally> {
	const { permutations, seed, keep = ['nodes-plain', 'nodes-nested'], withinStatistics } = options;
	// Within the split nothing is drawn, so its values are only memory.
	const kept: CountedStatistic[] = within ? [] : ['slope', ...keep];
	const statistics = within && withinStatistics ? { statistics: withinStatistics } : {};
	const wanted = { within, keep: kept, ...statistics };
	if (isExact(design, within, permutations)) return enumerateInBatches(design, wanted);
	const { share = { firstChunk: 0, chunkCount: chunksOf(permutations) } } = options;
	return tallyChunks(design, { ...wanted, ...share, seed, shuffles: permutations });
}
