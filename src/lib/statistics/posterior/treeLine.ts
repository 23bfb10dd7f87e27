import type { LaidTree } from './posteriorTree.ts';
import type { NodeScores } from './nodeScores.ts';
import { nodeSums } from './nodeSums.ts';

/** The line of overlap on age over all pairs of one tree. */
export type TreeLine = { readonly slope: number; readonly intercept: number; readonly r: number };

/** Facts of the overlaps that are the same for every tree. */
export type OverlapFacts = {
	/** shape (n, n), row-major */
	readonly overlap: Float64Array;
	readonly mean: number;
	/** root of the sum of squared deviations over pairs; above 0 */
	readonly spread: number;
};

/** Mean and spread of the pairs of a matrix, from deviations. */
export function overlapFacts(overlap: Float64Array, n: number): OverlapFacts {
	let sum = 0;
	for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) sum += overlap[i * n + j] ?? 0;
	const mean = sum / ((n * (n - 1)) / 2);
	let squares = 0;
	for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) squares += ((overlap[i * n + j] ?? 0) - mean) ** 2;
	return { overlap, mean, spread: Math.sqrt(squares) };
}

/** @param scored - `nodeScores` of the slope */
export function treeLine({ overlap, mean, spread }: OverlapFacts, laid: LaidTree, scored: NodeScores): TreeLine {
	const { scores, spread: ageSpread } = scored;
	const { pairs, ages } = laid;
	const sums = nodeSums(overlap, laid);
	let product = 0;
	let ageSum = 0;
	let total = 0;
	for (let slot = 0; slot < sums.length; slot++) {
		const count = pairs[slot] ?? 0;
		// Scores sum to 0 over pairs, so taking the mean out changes nothing but the rounding.
		product += (scores[slot] ?? 0) * ((sums[slot] ?? 0) - count * mean);
		ageSum += count * (ages[slot] ?? 0);
		total += count;
	}
	const slope = product / ageSpread;
	return { slope, intercept: mean - (slope * ageSum) / total, r: Math.max(-1, Math.min(1, product / spread)) };
}
