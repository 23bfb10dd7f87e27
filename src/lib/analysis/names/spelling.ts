/** Start and end (exclusive) of a stretch of a text, in UTF-16 units. */
export type CharRange = readonly [start: number, end: number];
export type SpellingDifference = { readonly species: readonly CharRange[]; readonly tip: readonly CharRange[] };

/**
 * Optimal string alignment distance: fewest insertions, deletions, substitutions and swaps of neighbours, no stretch edited
 * twice.
 *
 * @returns the distance if it is at most `limit`, else `limit` + 1. Cost: product of the lengths between the common ends.
 * @see Damerau (1964), doi:10.1145/363958.363994
 */
export function editDistance(a: string, b: string, limit: number): number {
	if (Math.abs(a.length - b.length) > limit) return limit + 1;
	const { from, endA, endB } = differingCore(a, b);
	const [width, height] = [endB - from, endA - from];
	let before: number[] = [];
	let above = Array.from({ length: width + 1 }, (_, j) => j);
	for (let i = 1; i <= height; i++) {
		const row = [i];
		let least = i;
		for (let j = 1; j <= width; j++) {
			const [x, y] = [from + i - 1, from + j - 1];
			let cost = Math.min((above[j - 1] ?? 0) + (a[x] === b[y] ? 0 : 1), (above[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1);
			if (i > 1 && j > 1 && a[x] === b[y - 1] && a[x - 1] === b[y]) cost = Math.min(cost, (before[j - 2] ?? 0) + 1);
			row.push(cost);
			least = Math.min(least, cost);
		}
		// A swap reaches back two rows, so one row above the limit is not yet proof.
		if (least > limit && Math.min(...above) > limit) return limit + 1;
		before = above;
		above = row;
	}
	return Math.min(above[width] ?? 0, limit + 1);
}

function differingCore(a: string, b: string): { from: number; endA: number; endB: number } {
	let from = 0;
	while (from < a.length && from < b.length && a[from] === b[from]) from += 1;
	let [endA, endB] = [a.length, b.length];
	while (endA > from && endB > from && a[endA - 1] === b[endB - 1]) {
		endA -= 1;
		endB -= 1;
	}
	return { from, endA, endB };
}

/** Whether two names differ only by a swap of two neighbouring letters. */
export function isSwap(a: string, b: string): boolean {
	const { from, endA, endB } = differingCore(a, b);
	return endA - from === 2 && endB - from === 2 && a[from] === b[from + 1] && a[from + 1] === b[from];
}

/**
 * The stretches in which a species name and a tip label differ, for underlining. Case and underscores do not count. The
 * alignment keeps a longest common subsequence. Cost: product of the lengths.
 */
export function spellingDifference(species: string, tip: string): SpellingDifference {
	const [a, b] = [folded(species), folded(tip)];
	const common = commonLengths(a, b);
	const [inA, inB]: [number[], number[]] = [[], []];
	let [i, j] = [0, 0];
	while (i < a.length || j < b.length) {
		if (i < a.length && j < b.length && a[i] === b[j]) {
			i += 1;
			j += 1;
		} else if (j >= b.length || (i < a.length && (common[i + 1]?.[j] ?? 0) >= (common[i]?.[j + 1] ?? 0))) inA.push(i++);
		else inB.push(j++);
	}
	return { species: asRanges(inA), tip: asRanges(inB) };
}

/** Length of the longest common subsequence of the rests a[i…] and b[j…]. */
function commonLengths(a: readonly string[], b: readonly string[]): number[][] {
	const common = Array.from({ length: a.length + 1 }, () => new Array<number>(b.length + 1).fill(0));
	for (let i = a.length - 1; i >= 0; i--) {
		const [row, below] = [common[i] ?? [], common[i + 1] ?? []];
		for (let j = b.length - 1; j >= 0; j--) {
			row[j] = a[i] === b[j] ? (below[j + 1] ?? 0) + 1 : Math.max(below[j] ?? 0, row[j + 1] ?? 0);
		}
	}
	return common;
}

function folded(name: string): string[] {
	return name.split('').map((sign) => (sign === '_' ? ' ' : sign.toLowerCase()));
}

function asRanges(positions: readonly number[]): CharRange[] {
	const ranges: [number, number][] = [];
	for (const position of positions) {
		const last = ranges.at(-1);
		if (last !== undefined && last[1] === position) last[1] = position + 1;
		else ranges.push([position, position + 1]);
	}
	return ranges;
}
