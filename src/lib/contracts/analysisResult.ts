import { z } from 'zod';
import { remarkSchema } from './remark.ts';
import { AGE_UNITS } from './materials.ts';
import { measureSchema } from './measureSchema.ts';
import { ALTERNATIVES, STATISTICS } from './plan.ts';
import {
	ageClassSchema,
	alsoTestedSchema,
	cladeRowSchema,
	cladeTestSchema,
	fallBlockSchema,
	influenceBlockSchema,
	matrixRegressionBlockSchema,
	partialBlockSchema,
	powerBlockSchema,
	signalBlockSchema,
	sistersBlockSchema,
	treesBlockSchema
} from './resultBlocks.ts';

const probability = z.number().min(0).max(1);

export const tailsSchema = z.object({ pLess: probability, pGreater: probability, pTwoSided: probability });

export const regressionSchema = z.object({
	slope: z.number(),
	intercept: z.number(),
	r: z.number(),
	rSquared: z.number(),
	residualStandardDeviation: z.number()
});

export const deepestSplitSchema = tailsSchema.extend({
	/** species on each side of the root */
	sides: z.array(z.number().int()),
	/** share of all pairs that meet at the root */
	rootPairShare: probability,
	exact: z.boolean(),
	count: z.number().int(),
	smallestP: probability
});

export const permutationSchema = z.object({
	statistic: z.enum(STATISTICS),
	observed: z.number(),
	/** n! when exact, else the number of shuffles m */
	count: z.number().int(),
	exact: z.boolean(),
	/** arrangements at least as extreme in the tail of the plan's alternative; the identity included only when exact */
	asExtreme: z.number().int(),
	p: probability,
	pLess: probability,
	pGreater: probability,
	pTwoSided: probability,
	monteCarloStandardError: z.number().nonnegative(),
	interval: z.tuple([probability, probability]).nullable(),
	smallestP: probability,
	distinctAges: z.number().int(),
	moments: z.object({ statistic: z.literal('z'), mean: z.number(), variance: z.number(), skewness: z.number().nullable() }),
	/** quantiles of the shuffled statistic: [probability, value] */
	quantiles: z.array(z.tuple([probability, z.number()])),
	/** null when the sides hold too few species to shuffle */
	withinDeepestSplit: deepestSplitSchema.nullable(),
	/** p of the plan's statistic adjusted for what was tested beside it; only when something was */
	pAdjusted: probability.optional(),
	also: z.array(alsoTestedSchema).optional()
});

export const nodeTestSchema = z
	.object({ slope: z.number(), intercept: z.number(), rSquared: z.number() })
	.extend(tailsSchema.shape)
	/** of the intercept, which at this level is a test of its own */
	.extend({ interceptTails: tailsSchema.optional() });

export const nodeSchema = z.object({
	/** preorder index in the pruned tree */
	node: z.number().int(),
	age: z.number(),
	nested: z.number(),
	plain: z.number(),
	pairs: z.number().int(),
	children: z.array(z.array(z.string()))
});

/** What the plate draws that the tables do not hold. Lines are shuffled slopes of all pairs, evenly thinned from the stream. */
export const plateDataSchema = z.object({
	/** the pruned tree, preorder */
	tree: z.object({
		parent: z.array(z.number().int()),
		age: z.array(z.number()),
		label: z.array(z.string())
	}),
	/** species in tree order: the order of the wing and of the rows of `overlap` */
	species: z.array(z.string()),
	/** strict lower triangle in tree order, row by row: (1,0), (2,0), (2,1), … */
	overlapLower: z.array(z.number()),
	meanAge: z.number(),
	meanOverlap: z.number(),
	/** about 120 shuffled slopes of all pairs */
	fanSlopes: z.array(z.number()),
	/** histogram of all shuffled slopes; edges has one more entry than counts */
	slopeHistogram: z.object({ edges: z.array(z.number()), counts: z.array(z.number().int()) }),
	/** null where node slopes were not shuffled */
	nodeSlopeHistogram: z.object({ edges: z.array(z.number()), counts: z.array(z.number().int()) }).nullable()
});

/** What was compared and how, so that a stored result can be read by itself. */
export const comparedSchema = z.object({
	measure: measureSchema,
	ageUnit: z.enum(AGE_UNITS),
	tree: z.object({ index: z.number().int(), name: z.string(), treesInSet: z.number().int() }),
	rootAge: z.number(),
	polytomies: z.number().int(),
	ultrametricSpread: z.number(),
	/** the person accepted that the tips be levelled */
	levelled: z.boolean(),
	meanOverlap: z.number(),
	alternative: z.enum(ALTERNATIVES),
	transform: z.enum(['none', 'logit']),
	alpha: z.number()
});

export const FINDING_KINDS = [
	'signal',
	'stronger-than-random-walk',
	'one-old-divergence',
	'within-split-only',
	'none-detected',
	'rises-with-age',
	'too-few'
] as const;

export const findingSchema = z.object({
	kind: z.enum(FINDING_KINDS),
	title: z.string(),
	sentence: z.string(),
	/** the sentence in stretches; one with a key is a number that can be traced */
	parts: z.array(z.object({ text: z.string(), key: z.enum(['slope', 'p', 'within', 'species', 'shuffles']).optional() })),
	/** what the result does not show */
	limits: z.array(z.string()),
	cautions: z.array(z.object({ code: z.string(), message: z.string() }))
});

export const analysisResultSchema = z.object({
	compared: comparedSchema,
	species: z.number().int(),
	pairs: z.number().int(),
	dropped: z.array(z.object({ name: z.string(), in: z.enum(['tree', 'data']), why: z.string() })),
	remarks: z.array(remarkSchema),
	regression: regressionSchema,
	permutation: permutationSchema,
	mantel: z.object({ r: z.number(), z: z.number(), spearman: z.number() }),
	nodeAverages: z.object({ nodes: z.array(nodeSchema), nested: nodeTestSchema, plain: nodeTestSchema }),
	partial: partialBlockSchema.optional(),
	matrixRegression: matrixRegressionBlockSchema.optional(),
	clades: z.array(cladeRowSchema).optional(),
	cladeTest: cladeTestSchema.optional(),
	sisters: sistersBlockSchema.optional(),
	trees: treesBlockSchema.optional(),
	ageClasses: z.array(ageClassSchema).optional(),
	fall: fallBlockSchema.optional(),
	influence: influenceBlockSchema.optional(),
	power: powerBlockSchema.optional(),
	signal: signalBlockSchema.optional(),
	finding: findingSchema,
	engine: z.object({ version: z.string(), seed: z.number(), kernel: z.string() }),
	plate: plateDataSchema
});

export type AnalysisResult = z.infer<typeof analysisResultSchema>;
export type PlateData = z.infer<typeof plateDataSchema>;
export type Finding = z.infer<typeof findingSchema>;
export type FindingKind = (typeof FINDING_KINDS)[number];
export type NodeRow = z.infer<typeof nodeSchema>;

/** What a running analysis tells the page, at most 20 times a second. */
export const progressSchema = z.object({
	done: z.number().int(),
	total: z.number().int(),
	asExtreme: z.number().int(),
	p: probability,
	monteCarloStandardError: z.number(),
	/** the observed all-pairs slope and the pivot, known from the first message on */
	slope: z.number(),
	meanAge: z.number(),
	meanOverlap: z.number(),
	/** shuffled slopes that are new since the last message, thinned */
	newSlopes: z.array(z.number())
});
export type AnalysisProgress = z.infer<typeof progressSchema>;
