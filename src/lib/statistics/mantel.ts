import { compensatedSum } from './compensatedSum.ts';
import { linearRegression } from './linearRegression.ts';
import { midRanks } from './midRanks.ts';

export type Mantel = {
	/** sum over pairs of overlap times age; unit of age */
	readonly z: number;
	/** Pearson correlation over pairs; negative where overlap falls with age */
	readonly r: number;
	/** the same correlation of mid-ranks */
	readonly spearman: number;
};

/**
 * Mantel's statistics of ages (a distance) and overlaps (a similarity), each pair once.
 *
 * @param ages - shape (pairs,); one MRCA age per pair
 * @param overlaps - shape (pairs,); same pairs, same order
 * @throws {InputError} as `linearRegression`
 * @see Mantel (1967), Cancer Research 27:209-220
 */
export function mantel(ages: ArrayLike<number>, overlaps: ArrayLike<number>): Mantel {
	const { r } = linearRegression(ages, overlaps);
	const spearman = linearRegression(midRanks(ages), midRanks(overlaps)).r;
	const z = compensatedSum(Float64Array.from(ages, (age, i) => age * (overlaps[i] ?? 0)));
	return { z, r, spearman };
}
