import { assertAllFinite } from './assertAllFinite.ts';

/** Ages read from a file of six to ten digits that differ by less than this share of the oldest are one age. */
const AGE_TOLERANCE = 1e-9;

/**
 * How many different ages there are: few ages make a regression on them rest on few events.
 *
 * @param ages - shape (nodes,); unit of the tree
 * @param tolerance - share of the largest age within which neighbours in order are one age
 * @throws {InputError} `non-finite`
 */
export function distinctAges(ages: ArrayLike<number>, tolerance = AGE_TOLERANCE): number {
	assertAllFinite(ages, 'age');
	const sorted = Float64Array.from(ages).sort();
	const gap = tolerance * Math.abs(sorted.at(-1) ?? 0);
	let count = Math.min(1, sorted.length);
	for (let i = 1; i < sorted.length; i++) if ((sorted[i] ?? 0) - (sorted[i - 1] ?? 0) > gap) count++;
	return count;
}
