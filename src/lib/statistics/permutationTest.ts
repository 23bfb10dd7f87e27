import { arrangementCount, type Group } from './arrangements.ts';
import type { PermutationDesign, PermutationStatistic } from './permutationDesign.ts';
import { permutationPValue, type TailProbabilities } from './permutationPValue.ts';
import { chunksOf, enumerateInBatches, runChunks } from './runChunks.ts';
import { addCounts, mergeTallies, type TailCounts, type Tally } from './tally.ts';

/** Up to 8 species (8! = 40,320) the null is always enumerated, however few shuffles were asked for. */
const ALWAYS_EXACT_SPECIES = 8;
const ALWAYS_EXACT_ARRANGEMENTS = 40_320;

export type TestedStatistic = TailCounts & TailProbabilities & { readonly observed: number };

/** The null distribution of one question, and where the data stand in it. */
export type NullOutcome = {
	readonly exact: boolean;
	/** number of arrangements when exact (the observed one is among them), else m shuffles */
	readonly count: number;
	/** `slope-log-age` is absent where an internal node has age 0 */
	readonly statistics: Readonly<Partial<Record<PermutationStatistic, TestedStatistic>>>;
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
	/** called after every chunk or batch; it may throw to stop the test */
	readonly onProgress?: (progress: PermutationProgress) => void;
};

/**
 * Tests whether overlap goes with age, by moving species over the tips of the tree: freely, and again within the
 * daughters of the root only. Exact where the arrangements are no more than the shuffles asked for, and always up to 8
 * species; else Monte Carlo. Equal design, seed and number give equal bits.
 */
export function permutationTest(design: PermutationDesign, options: PermutationOptions): PermutationOutcome {
	const asked = design.within.length > 0 ? [false, true] : [false];
	const total = asked.reduce((sum, within) => sum + planned(design, within, options.permutations).count, 0);
	const report = { done: 0, total };
	const free = nullOutcome(
		design,
		askQuestion(design, false, { ...options, report }),
		isExact(design, false, options.permutations)
	);
	if (design.within.length === 0) return { free, within: null };
	const inside = nullOutcome(
		design,
		askQuestion(design, true, { ...options, report }),
		isExact(design, true, options.permutations)
	);
	return { free, within: { ...inside, sides: design.sides, rootPairShare: design.rootPairShare } };
}

/** Whether a question is enumerated. */
export function isExact(design: PermutationDesign, within: boolean, permutations: number): boolean {
	return planned(design, within, permutations).exact;
}

/** A merged tally read as p-values. */
export function nullOutcome(design: PermutationDesign, tally: Tally, exact: boolean): NullOutcome {
	const statistics: Partial<Record<PermutationStatistic, TestedStatistic>> = {};
	for (const { statistic, observed } of design.functionals) {
		const counts = tally.counts[statistic];
		if (!counts) throw new Error(`The tally holds no counts of ${statistic}.`);
		statistics[statistic] = { observed, ...counts, ...permutationPValue(counts, tally.arrangements, exact) };
	}
	return { exact, count: tally.arrangements, statistics, values: tally.values };
}

function planned(design: PermutationDesign, within: boolean, permutations: number): { exact: boolean; count: number } {
	const groups = within ? design.within : design.free;
	const all = arrangementCount(groups);
	const few = all <= ALWAYS_EXACT_ARRANGEMENTS && groups.every(({ from, to }: Group) => to - from <= ALWAYS_EXACT_SPECIES);
	const exact = few || all <= permutations;
	return { exact, count: exact ? all : permutations };
}

type Asking = PermutationOptions & { readonly report: { done: number; readonly total: number } };

function askQuestion(design: PermutationDesign, within: boolean, asking: Asking): Tally {
	const { report, onProgress } = asking;
	const tallies: Tally[] = [];
	let counts: Tally['counts'] = {};
	let done = 0;
	for (const tally of talliesOf(design, within, asking)) {
		tallies.push(tally);
		counts = addCounts([{ counts }, tally]);
		done += tally.arrangements;
		report.done += tally.arrangements;
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

function* talliesOf(design: PermutationDesign, within: boolean, options: PermutationOptions): Generator<Tally> {
	const { permutations, seed, keep = ['nodes-plain', 'nodes-nested'] } = options;
	// Within the split nothing is drawn, so its values are only memory.
	const kept: PermutationStatistic[] = within ? [] : ['slope', ...keep];
	if (isExact(design, within, permutations)) {
		yield* enumerateInBatches(design, { within, keep: kept });
		return;
	}
	for (let firstChunk = 0; firstChunk < chunksOf(permutations); firstChunk++) {
		yield runChunks(design, { seed, firstChunk, chunkCount: 1, shuffles: permutations, within, keep: kept });
	}
}
