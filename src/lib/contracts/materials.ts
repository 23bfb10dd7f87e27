import { z } from 'zod';
import { measureSchema } from './measureSchema.ts';
import { treeAboutSchema } from './treeAbout.ts';

export const AGE_UNITS = ['Ma', 'ka', 'relative'] as const;
export type AgeUnit = (typeof AGE_UNITS)[number];

export const TREE_SET_KINDS = ['summary', 'posterior'] as const;
export type TreeSetKind = (typeof TREE_SET_KINDS)[number];

export const ANALYSIS_STATUSES = ['waiting', 'working', 'finished', 'stopped', 'failed'] as const;
export type AnalysisStatus = (typeof ANALYSIS_STATUSES)[number];

/** Decisions a body may make in advance about doubtful readings. */
export const confirmSchema = z.strictObject({
	kind: z.enum(['similarity', 'distance']).optional(),
	scale: z.enum(['fraction', 'percent']).optional(),
	triangle: z.enum(['average', 'upper', 'lower']).optional(),
	spread: z.literal(true).optional()
});
export type Confirm = z.infer<typeof confirmSchema>;

const label = z.string().trim().min(1).max(200);

export const treeSetRequestSchema = z.strictObject({
	label,
	text: z.string(),
	ageUnit: z.enum(AGE_UNITS).default('Ma'),
	kind: z.enum(TREE_SET_KINDS).optional(),
	/** trees to leave out at the start, or their share, above 0 and below 1 */
	burnIn: z.union([z.number().int().nonnegative(), z.number().gt(0).lt(1)]).optional(),
	thin: z.number().int().positive().optional(),
	about: treeAboutSchema.optional(),
	confirm: confirmSchema.optional()
});
export type TreeSetRequest = z.infer<typeof treeSetRequestSchema>;

export const matrixSchema = z.strictObject({
	species: z.array(z.string()).min(1),
	values: z.array(z.array(z.number().nullable()))
});

export const overlapRunRequestSchema = z
	.strictObject({
		label,
		measure: measureSchema,
		matrix: matrixSchema.optional(),
		csv: z.string().optional(),
		confirm: confirmSchema.optional()
	})
	.refine((body) => (body.matrix === undefined) !== (body.csv === undefined), 'Give either `matrix` or `csv`, one of the two.');
export type OverlapRunRequest = z.infer<typeof overlapRunRequestSchema>;

export const studyRequestSchema = z.strictObject({
	title: label,
	lab: z.string().optional(),
	question: z.string().max(2000).optional()
});

export const namesRequestSchema = z.strictObject({
	decisions: z
		.array(z.strictObject({ from: z.string().min(1), to: z.string().min(1).nullable(), why: z.string().max(500).optional() }))
		.max(10_000)
});

export const tokenRequestSchema = z.strictObject({ email: z.string().max(320), password: z.string().max(200), label });
