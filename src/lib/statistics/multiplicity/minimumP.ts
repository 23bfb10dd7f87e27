/** Which side of a null distribution counts as extreme. Two-sided: twice the smaller tail, at most 1. */
export type Tail = 'less' | 'greater' | 'two-sided';

/** One statistic on a stream of shuffles that it shares with others. */
export type SharedNull = {
	readonly observed: number;
	/** shape (arrangements,), in the order of the stream; the observed arrangement is among them only when exact */
	readonly values: Float64Array;
	/** values this close count as tied; unit of the statistic */
	readonly tie: number;
};

export type AdjustedP = {
	readonly p: number;
	/** share of arrangements in which any statistic of the family reaches a p as small as this one's */
	readonly pSingleStep: number;
	/** the same among the statistics with p no smaller; never below that of a statistic with a smaller p */
	readonly pStepDown: number;
};

export type MinimumP = {
	/** in the order of the statistics given */
	readonly adjusted: readonly AdjustedP[];
	/** shape (members,), ascending: the smallest p of the family in each arrangement, the observed one included */
	readonly minima: Float64Array;
};

type Family = { readonly tail: Tail; readonly exact: boolean };

/**
 * p-values of several statistics adjusted for their number by the minimum p, under shuffles that all of them share.
 * Each arrangement, the observed one included, gets its own p for each statistic from its place in that statistic's null;
 * the adjusted p is the share of arrangements whose smallest p is as small as the observed one. Exact when every
 * arrangement is as likely as the observed one (the global null); it holds each statistic to account on its own when
 * the others are not null only if theirs leave its null alone (subset pivotality), which shuffled species on nested
 * clades do not promise. Minimum p, not maximum z: a skewed statistic gets no head start.
 *
 * Memory: the values given, K × m doubles, and 24 bytes per arrangement beside them. Cost: K m log m.
 *
 * @throws {Error} without statistics, with streams of different lengths, or when a number is not finite
 * @see Westfall & Young (1993), Resampling-Based Multiple Testing, algorithms 2.5 (single step) and 2.8 (step-down)
 */
export function minimumP(statistics: readonly SharedNull[], family: Family): MinimumP {
	assertShared(statistics);
	const counts = statistics.map((statistic) => extremeCount(statistic, family));
	const members = (statistics[0]?.values.length ?? 0) + (family.exact ? 0 : 1);
	// From the largest p down, so that each meets the minimum over those with p no smaller than its own.
	const order = [...statistics.keys()].sort((a, b) => (counts[b] ?? 0) - (counts[a] ?? 0));
	const smallest = new Float64Array(members).fill(members);
	const stepDown = new Map<number, number>();
	for (const k of order) {
		const statistic = statistics[k];
		if (statistic === undefined) continue;
		lowerInPlace(smallest, memberCounts(statistic, family));
		stepDown.set(k, adjustedFrom(smallest, counts[k] ?? 0));
	}
	let floor = 0;
	for (const k of order.reverse()) {
		floor = Math.max(floor, stepDown.get(k) ?? 0);
		stepDown.set(k, floor);
	}
	const adjusted = counts.map((count, k) => ({
		p: count / members,
		pSingleStep: adjustedFrom(smallest, count),
		pStepDown: stepDown.get(k) ?? 1
	}));
	return { adjusted, minima: smallest.map((count) => count / members).sort() };
}

/** Arrangements at least as extreme as the observed one, itself included: the p-value times their number. */
function extremeCount({ observed, values, tie }: SharedNull, { tail, exact }: Family): number {
	const itself = exact ? 0 : 1;
	let less = itself;
	let greater = itself;
	for (const value of values) {
		if (value <= observed + tie) less++;
		if (value >= observed - tie) greater++;
	}
	return countIn({ less, greater }, tail, values.length + itself);
}

/** The same count for every arrangement: the observed one first when it is not among the values. */
function memberCounts({ observed, values, tie }: SharedNull, { tail, exact }: Family): Float64Array {
	const counts = exact ? values.slice() : joined(observed, values);
	const members = counts.length;
	const sorted = counts.slice().sort();
	for (let i = 0; i < members; i++) {
		const value = counts[i] ?? 0;
		// Each search is most of the cost, and one tail is all that is asked for as a rule.
		const greater = tail === 'less' ? 0 : members - firstFrom(sorted, value - tie);
		const less = tail === 'greater' ? 0 : firstAbove(sorted, value + tie);
		counts[i] = countIn({ less, greater }, tail, members);
	}
	return counts;
}

function joined(first: number, then: Float64Array): Float64Array {
	const all = new Float64Array(1 + then.length).fill(first, 0, 1);
	all.set(then, 1);
	return all;
}

function countIn({ less, greater }: { less: number; greater: number }, tail: Tail, members: number): number {
	if (tail === 'less') return less;
	return tail === 'greater' ? greater : Math.min(members, 2 * Math.min(less, greater));
}

/** Index of the first entry above `bound`. */
function firstAbove(sorted: Float64Array, bound: number): number {
	let low = 0;
	let high = sorted.length;
	while (low < high) {
		const middle = (low + high) >>> 1;
		if ((sorted[middle] ?? 0) <= bound) low = middle + 1;
		else high = middle;
	}
	return low;
}

/** Index of the first entry at or above `bound`. */
function firstFrom(sorted: Float64Array, bound: number): number {
	let low = 0;
	let high = sorted.length;
	while (low < high) {
		const middle = (low + high) >>> 1;
		if ((sorted[middle] ?? 0) < bound) low = middle + 1;
		else high = middle;
	}
	return low;
}

function lowerInPlace(smallest: Float64Array, counts: Float64Array): void {
	for (let i = 0; i < smallest.length; i++) smallest[i] = Math.min(smallest[i] ?? 0, counts[i] ?? 0);
}

/** Never below p itself: doubled tails of a lumpy null promise less than they hold, and nobody expects an adjustment to help. */
function adjustedFrom(smallest: Float64Array, count: number): number {
	let asSmall = 0;
	for (const value of smallest) if (value <= count) asSmall++;
	return Math.max(asSmall, count) / smallest.length;
}

function assertShared(statistics: readonly SharedNull[]): void {
	const arrangements = statistics[0]?.values.length ?? 0;
	if (arrangements === 0) throw new Error('A minimum p needs a statistic and an arrangement.');
	for (const [k, { observed, values }] of statistics.entries()) {
		if (values.length !== arrangements) {
			throw new Error(`Statistic ${k} has ${values.length} values where the first has ${arrangements}.`);
		}
		if (!Number.isFinite(observed) || !values.every(Number.isFinite)) throw new Error(`Statistic ${k} is not finite throughout.`);
	}
}
