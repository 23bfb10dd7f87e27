import { z } from 'zod';

/** How tips came into a tree: by sequences, some of them by taxonomy alone, or nobody has said. */
export const TIP_PLACEMENTS = ['sequences', 'some-placed', 'unknown'] as const;

/** What only the author of a tree knows. Every answer may stay open; the report then says that it is not known. */
export const treeAboutSchema = z.strictObject({
	/** living species of the clade, in the tree or not */
	speciesInClade: z.number().int().positive().max(1_000_000).nullable().default(null),
	placement: z.enum(TIP_PLACEMENTS).default('unknown'),
	/** tips placed by taxonomy, not by sequences */
	placedTips: z.array(z.string().min(1)).max(10_000).default([]),
	/** fossils, rates or other trees that the ages rest on */
	calibration: z.string().trim().max(1000).default(''),
	/** where the tree is published or kept */
	source: z.string().trim().max(1000).default('')
});
export type TreeAbout = z.infer<typeof treeAboutSchema>;

export const NOTHING_KNOWN: TreeAbout = treeAboutSchema.parse({});

export function isNothingKnown(about: TreeAbout): boolean {
	return JSON.stringify(about) === JSON.stringify(NOTHING_KNOWN);
}
