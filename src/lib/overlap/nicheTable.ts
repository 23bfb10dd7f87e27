import type { Remark } from '#lib/remarks/remark.ts';

/**
 * What a column of a niche table tells: where a species stands on an axis of its niche, or one of the things that can
 * make overlap fall with age by themselves: how broad its niche is, from how many records it is known, how large its range is.
 */
export const NICHE_ROLES = ['position', 'breadth', 'records', 'range-size'] as const;
export type NicheRole = (typeof NICHE_ROLES)[number];

export type NicheVariable = {
	readonly name: string;
	readonly role: NicheRole;
	/** shape (species,); NaN where it is missing; unit of the column */
	readonly values: Float64Array;
	/** shape (species,); standard error of each value, >= 0, NaN where missing; null when the table has none */
	readonly standardErrors: Float64Array | null;
};

export type NicheTable = {
	readonly species: readonly string[];
	readonly variables: readonly NicheVariable[];
	readonly remarks: readonly Remark[];
};
