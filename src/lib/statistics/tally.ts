import type { ValueColumn } from './arrangementValues.ts';
import { COUNTED_STATISTICS, type CountedStatistic, type Functional } from './functionals.ts';

/** Arrangements at least as extreme as the observed one in each tail; ties count in both. */
export type TailCounts = { readonly less: number; readonly greater: number };

/** What a run of arrangements left behind. Tallies of neighbouring runs join without loss. */
export type Tally = {
	/** chunk (or batch of an enumeration) with which the run began */
	readonly firstChunk: number;
	readonly arrangements: number;
	readonly counts: Readonly<Partial<Record<CountedStatistic, TailCounts>>>;
	/** shape (arrangements,) each: the values of the statistics kept, in the order of the stream */
	readonly values: Readonly<Partial<Record<CountedStatistic, Float64Array>>>;
};

/** One statistic being counted. */
export type Counter = {
	readonly functional: Functional;
	readonly values: Float64Array | null;
	less: number;
	greater: number;
};

export function newCounters(
	functionals: readonly Functional[],
	arrangements: number,
	keep: readonly CountedStatistic[]
): Counter[] {
	return functionals.map((functional) => ({
		functional,
		values: keep.includes(functional.statistic) ? new Float64Array(arrangements) : null,
		less: 0,
		greater: 0
	}));
}

export type Judging = {
	/** arrangements in the column */
	readonly count: number;
	/** place of the first among those of the run */
	readonly first: number;
	/** the value of one arrangement by the plain loop on the overlaps as they are */
	readonly byLoop: (functional: Functional, index: number) => number;
};

/**
 * Judges arrangements: within the tie of the observed value counts in both tails. A value so close to the edge of the
 * tie that the kernel could be on the wrong side of it is computed again by the plain loop, so counts are exactly those
 * of the rule.
 */
export function countInPlace(counter: Counter, column: ValueColumn, { count, first, byLoop }: Judging): void {
	const { functional, values: kept } = counter;
	const top = functional.observed + functional.tie;
	const bottom = functional.observed - functional.tie;
	const { values, from, step, slack } = column;
	for (let index = 0; index < count; index++) {
		let value = values[from + index * step] ?? Number.NaN;
		if (slack > 0 && (Math.abs(value - top) <= slack || Math.abs(value - bottom) <= slack)) value = byLoop(functional, index);
		if (value <= top) counter.less++;
		if (value >= bottom) counter.greater++;
		if (kept) kept[first + index] = value;
	}
}

export function tallyOf(counters: readonly Counter[], firstChunk: number, arrangements: number): Tally {
	const counts: Partial<Record<CountedStatistic, TailCounts>> = {};
	const values: Partial<Record<CountedStatistic, Float64Array>> = {};
	for (const { functional, less, greater, values: kept } of counters) {
		counts[functional.statistic] = { less, greater };
		if (kept) values[functional.statistic] = kept.length === arrangements ? kept : kept.slice(0, arrangements);
	}
	return { firstChunk, arrangements, counts, values };
}

/** Counts added up, statistic by statistic. */
export function addCounts(tallies: readonly Pick<Tally, 'counts'>[]): Tally['counts'] {
	const sums: Partial<Record<CountedStatistic, TailCounts>> = {};
	for (const { counts } of tallies) {
		for (const statistic of statisticsOf(counts)) {
			const { less = 0, greater = 0 } = counts[statistic] ?? {};
			const before = sums[statistic] ?? { less: 0, greater: 0 };
			sums[statistic] = { less: before.less + less, greater: before.greater + greater };
		}
	}
	return sums;
}

/**
 * Joins the tallies of one question, whoever ran them and in whatever order they came: counts add, values line up by
 * chunk. So any division of the chunks among workers gives the same bits.
 */
export function mergeTallies(tallies: readonly Tally[]): Tally {
	const ordered = [...tallies].sort((a, b) => a.firstChunk - b.firstChunk);
	const arrangements = ordered.reduce((sum, tally) => sum + tally.arrangements, 0);
	const values: Partial<Record<CountedStatistic, Float64Array>> = {};
	for (const statistic of statisticsOf(ordered[0]?.values ?? {})) {
		const joined = new Float64Array(arrangements);
		let from = 0;
		for (const tally of ordered) {
			joined.set(tally.values[statistic] ?? [], from);
			from += tally.arrangements;
		}
		values[statistic] = joined;
	}
	return { firstChunk: ordered[0]?.firstChunk ?? 0, arrangements, counts: addCounts(ordered), values };
}

function statisticsOf(record: Readonly<Partial<Record<CountedStatistic, unknown>>>): CountedStatistic[] {
	return COUNTED_STATISTICS.filter((statistic) => record[statistic] !== undefined);
}
