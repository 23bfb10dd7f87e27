import { z } from 'zod';
import { confirmSchema, matrixSchema } from './materials.ts';

/** Where the values of a covariate come from. */
export const COVARIATE_SOURCES = ['matrix', 'places'] as const;
export type CovariateSource = (typeof COVARIATE_SOURCES)[number];

/** `log` takes ln(1 + value): distances often matter less the longer they are. */
export const COVARIATE_SCALES = ['plain', 'log'] as const;
export type CovariateScale = (typeof COVARIATE_SCALES)[number];

export const COVARIATE_KINDS = ['distance', 'similarity'] as const;
export type CovariateKind = (typeof COVARIATE_KINDS)[number];

/** How the values of a kept covariate came about. */
export const covariateReadingSchema = z.object({
	source: z.enum(COVARIATE_SOURCES),
	kind: z.enum(COVARIATE_KINDS),
	scale: z.enum(COVARIATE_SCALES),
	/** in words for people; null when the values came without one */
	unit: z.string().nullable(),
	/** how the text lay; null for a matrix sent as numbers */
	separator: z.string().nullable()
});
export type CovariateReadingNotes = z.infer<typeof covariateReadingSchema>;

const givenOnce = 'Give one of `matrix`, `csv` and `places`.';

export const covariateRequestSchema = z
	.strictObject({
		label: z.string().trim().min(1).max(200),
		/** numbers of 0 or more, as they are */
		matrix: matrixSchema.optional(),
		csv: z.string().optional(),
		/** a table with the columns species, latitude, longitude, in degrees; distances are computed */
		places: z.string().optional(),
		scale: z.enum(COVARIATE_SCALES).default('plain'),
		confirm: confirmSchema.pick({ kind: true, triangle: true }).optional()
	})
	.refine(({ matrix, csv, places }) => [matrix, csv, places].filter((given) => given !== undefined).length === 1, givenOnce);
export type CovariateRequest = z.infer<typeof covariateRequestSchema>;
