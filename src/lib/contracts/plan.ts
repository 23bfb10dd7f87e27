import { z } from 'zod';

export const STATISTICS = ['slope', 'slope-log-age', 'nodes-plain', 'nodes-nested', 'spearman'] as const;
export const ALTERNATIVES = ['less', 'greater', 'two-sided'] as const;
export const PERMUTATION_LIMIT = 1_000_000;
/** Species of one clade, and clades that can be declared beforehand. */
export const CLADE_LIMIT = 2000;
export const CLADES_LIMIT = 50;
/** Seeds are whole numbers that a person can copy: 0 to 2³² − 1. */
export const SEED_LIMIT = 0xffff_ffff;

export const COVARIATES_LIMIT = 20;

export type Statistic = (typeof STATISTICS)[number];
export type Alternative = (typeof ALTERNATIVES)[number];

const id = z.string().min(1).max(64);

/** What a script or a form sends: every choice of an analysis, most of them optional. */
export const planRequestSchema = z.strictObject({
	treeSet: id,
	tree: z.union([z.number().int().nonnegative(), z.literal('all')]).optional(),
	overlapRun: id,
	species: z.union([z.literal('shared'), z.array(z.string()).min(1).max(2000)]).default('shared'),
	statistic: z.enum(STATISTICS).default('slope'),
	alsoTest: z.array(z.enum(STATISTICS)).max(5).default([]),
	alpha: z.number().gt(0).lt(1).default(0.05),
	alternative: z.enum(ALTERNATIVES).default('less'),
	transform: z.enum(['none', 'logit']).default('none'),
	permutations: z.number().int().min(1).max(PERMUTATION_LIMIT).default(9999),
	seed: z.number().int().min(0).max(SEED_LIMIT).optional(),
	covariates: z.array(id).max(COVARIATES_LIMIT).default([]),
	clades: z
		.strictObject({
			minTips: z.number().int().min(2).max(CLADE_LIMIT).default(3),
			/** groups named beforehand, tested in place of all clades */
			declared: z.array(z.array(z.string()).min(2).max(CLADE_LIMIT)).min(1).max(CLADES_LIMIT).optional()
		})
		.nullable()
		.default(null),
	signal: z
		.strictObject({
			variables: z.array(z.string()).min(1).max(100),
			/** id of a niche table of the study; the newest when not given */
			table: id.optional()
		})
		.nullable()
		.default(null),
	robustness: z.strictObject({}).loose().nullable().default(null)
});
export type PlanRequest = z.infer<typeof planRequestSchema>;

/** A plan as stored: every default written out, the seed drawn. Hashed as canonical JSON. */
export const planSchema = planRequestSchema.extend({
	tree: z.union([z.number().int().nonnegative(), z.literal('all')]),
	seed: z.number().int().min(0).max(SEED_LIMIT)
});
export type Plan = z.infer<typeof planSchema>;
