export type OverlapFigures = {
	readonly species: number;
	/** pairs that have a value */
	readonly pairs: number;
	readonly missing: number;
	/** null when no pair has a value */
	readonly spread: { readonly min: number; readonly median: number; readonly mean: number; readonly max: number } | null;
};

/**
 * Counts and location of the overlaps of a run.
 * @param lower - shape (n(n−1)/2,); NaN where a pair is missing
 */
export function overlapFigures(species: number, lower: Float64Array): OverlapFigures {
	const values = lower.filter((value) => !Number.isNaN(value)).sort();
	const counts = { species, pairs: values.length, missing: lower.length - values.length };
	const [min, max] = [values[0], values.at(-1)];
	if (min === undefined || max === undefined) return { ...counts, spread: null };
	const middle = Math.floor(values.length / 2);
	const upper = values[middle] ?? max;
	const median = values.length % 2 === 1 ? upper : ((values[middle - 1] ?? min) + upper) / 2;
	return { ...counts, spread: { min, median, mean: values.reduce((sum, value) => sum + value, 0) / values.length, max } };
}
