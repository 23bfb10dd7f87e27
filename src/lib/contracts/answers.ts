import { z } from 'zod';
import { analysisResultSchema, progressSchema } from './analysisResult.ts';
import { AGE_UNITS, ANALYSIS_STATUSES, TREE_SET_KINDS } from './materials.ts';
import { measureSchema } from './measureSchema.ts';
import { covariateReadingSchema } from './covariates.ts';
import { nicheVariableSchema } from './nicheTables.ts';
import { planSchema } from './plan.ts';
import { planContextSchema } from './planContext.ts';
import { remarkSchema } from './remark.ts';
import { figureSettingsSchema } from './report.ts';
import { treeAboutSchema } from './treeAbout.ts';

/** What `/api/v1` answers. The description at `/api/v1/openapi.json` is made from these schemas. */

const time = z.iso.datetime();
const remarks = z.array(remarkSchema);
const status = z.enum(ANALYSIS_STATUSES);
const count = z.number().int().nonnegative();

/** RFC 9457: every refusal under `/api/v1`. */
export const problemSchema = z.object({
	type: z.string(),
	title: z.string(),
	status: z.number().int(),
	detail: z.string(),
	/** stable, lower-case with dashes */
	code: z.string(),
	remarks,
	/** reference into the log, for a defect of ours */
	reference: z.string().optional()
});
export type Problem = z.infer<typeof problemSchema>;

export const tokenAnswerSchema = z.object({ token: z.string() });

export const studySchema = z.object({
	id: z.string(),
	title: z.string(),
	question: z.string(),
	lab: z.string(),
	isExample: z.boolean(),
	createdAt: time,
	changedAt: time
});
export type StudyAnswer = z.infer<typeof studySchema>;

export const studiesAnswerSchema = z.array(studySchema);

const listed = z.object({ id: z.string(), label: z.string(), createdAt: time });

/** A study with what it holds, newest first. */
export const studyAnswerSchema = studySchema.extend({
	treeSets: z.array(listed.extend({ treeCount: count, tipCount: count })),
	overlapRuns: z.array(listed.extend({ measure: measureSchema, speciesCount: count })),
	covariates: z.array(listed.extend({ speciesCount: count })),
	nicheTables: z.array(listed.extend({ variables: z.array(z.string()), speciesCount: count })),
	analyses: z.array(z.object({ id: z.string(), status, createdAt: time })),
	reports: z.array(z.object({ id: z.string(), title: z.string(), analysis: z.string(), createdAt: time }))
});

const treeSetFacts = z.object({
	treeCount: count,
	tipCount: count,
	/** relative spread of root-to-tip distances; null with missing lengths */
	ultrametricSpread: z.number().nonnegative().nullable(),
	polytomies: count,
	/** unit of the set; null with missing lengths */
	rootAge: z.number().nullable()
});

export const treeSetCreatedSchema = z.object({ id: z.string() }).extend(treeSetFacts.shape).extend({ remarks });

export const treeSetAnswerSchema = z.object({
	id: z.string(),
	label: z.string(),
	ageUnit: z.enum(AGE_UNITS),
	kind: z.enum(TREE_SET_KINDS),
	treeCount: count,
	/** which tree of the set this is, from 0 */
	tree: count,
	/** names of the tips in tree order */
	tips: z.array(z.string()),
	nodes: z.array(
		z.object({
			/** preorder index */
			id: count,
			parent: count.nullable(),
			age: z.number(),
			label: z.string(),
			tips: count,
			/** names of the tips below, with `?members=1` */
			members: z.array(z.string()).optional()
		})
	),
	rootAge: z.number(),
	about: treeAboutSchema,
	ultrametricSpread: z.number().nullable(),
	polytomies: count,
	remarks
});

export const squareSchema = z.object({ species: z.array(z.string()), values: z.array(z.array(z.number())) });

export const overlapRunCreatedSchema = z.object({ id: z.string(), species: z.array(z.string()), remarks });

export const overlapRunAnswerSchema = z.object({
	id: z.string(),
	label: z.string(),
	status: z.literal('finished'),
	measure: measureSchema,
	species: z.array(z.string()),
	/** similarities; null where a pair is missing */
	values: z.array(z.array(z.number().nullable())),
	/** of the pairs that are there; figures are null when there is none */
	summary: z.object({
		species: count,
		pairs: count,
		missing: count,
		min: z.number().nullable(),
		max: z.number().nullable(),
		mean: z.number().nullable(),
		median: z.number().nullable()
	}),
	/** how the text was read */
	reading: z.record(z.string(), z.unknown()),
	remarks
});

export const covariateCreatedSchema = z.object({ id: z.string(), species: z.array(z.string()), remarks });

export const covariateAnswerSchema = covariateCreatedSchema.extend({
	label: z.string(),
	/** as given, or computed: not turned into similarities; null where a pair is missing and on the diagonal */
	values: z.array(z.array(z.number().nullable())),
	reading: covariateReadingSchema
});

export const nicheTableAnswerSchema = z.object({
	id: z.string(),
	label: z.string(),
	species: z.array(z.string()),
	/** values in the order of `species`; null where one is missing */
	variables: z.array(nicheVariableSchema),
	remarks
});

export const namesAnswerSchema = z.object({
	decisions: z.array(
		z.object({ from: z.string(), to: z.string().nullable(), why: z.string(), decidedBy: z.string().nullable(), decidedAt: time })
	),
	/** tips of the newest tree set against species of the newest run; null until both are there */
	matching: z
		.object({
			sentence: z.string(),
			pairs: z.array(z.object({ species: z.string(), tip: z.string() })),
			dropped: z.array(z.object({ name: z.string(), in: z.enum(['tree', 'data']), why: z.string() })),
			/** what still asks for a decision; both names where a match is proposed */
			open: z.array(
				z.object({ species: z.string().nullable(), tip: z.string().nullable(), kind: z.string(), reason: z.string() })
			)
		})
		.nullable()
});

export const analysisStartedSchema = z.object({ id: z.string(), status, remarks });

export const analysisAnswerSchema = z.object({
	id: z.string(),
	status,
	/** while it works; null before and after */
	progress: progressSchema.omit({ newSlopes: true }).nullable(),
	plan: planSchema,
	/** what had been seen of the matrix when the plan was written down; null where that was not kept yet */
	seenBefore: planContextSchema.nullable(),
	hash: z.string(),
	createdAt: time,
	finishedAt: time.nullable(),
	result: analysisResultSchema.optional(),
	failure: z.object({ code: z.string(), message: z.string(), reference: z.string().optional() }).optional(),
	/** what has changed since it ran; empty when its materials and names still stand */
	outOfDate: z.array(z.object({ code: z.string(), message: z.string() })),
	remarks
});

export const analysisStatusSchema = z.object({ id: z.string(), status });

export const reportAnswerSchema = z.object({
	id: z.string(),
	analysis: z.string(),
	title: z.string(),
	caption: z.string(),
	notes: z.string(),
	figure: figureSettingsSchema,
	createdAt: time,
	changedAt: time
});
export type ReportAnswer = z.infer<typeof reportAnswerSchema>;

/** `?width=174&dpi=600&age=left` of a plate; a query holds text, so numbers are read from it. */
export const plateQuerySchema = z.strictObject({
	width: z.coerce.number().pipe(figureSettingsSchema.shape.widthMm.unwrap()).optional(),
	dpi: z.coerce.number().pipe(figureSettingsSchema.shape.dpi.unwrap()).optional(),
	age: figureSettingsSchema.shape.age.unwrap().optional(),
	palette: figureSettingsSchema.shape.palette.unwrap().optional(),
	type: z.coerce.number().pipe(figureSettingsSchema.shape.typeSizePt.unwrap()).optional()
});
export const treeQuerySchema = z.strictObject({
	tree: z.coerce.number().int().nonnegative().default(0),
	members: z.enum(['0', '1']).default('0')
});
/** `species` may come several times or as one comma-separated list; see the route. */
export const agesQuerySchema = z.strictObject({
	tree: z.coerce.number().int().nonnegative().default(0),
	species: z.array(z.string().min(1)).min(1).optional()
});
