import { z } from 'zod';
import { STATISTICS } from './plan.ts';

/**
 * The blocks of a result that a plan may ask for beyond the test itself. All of them are optional in a stored result:
 * one made before a block existed still reads.
 */
const probability = z.number().min(0).max(1);
const tails = { pLess: probability, pGreater: probability, pTwoSided: probability };

/** How a number varies over the trees of a set: a description of sensitivity, not a probability. */
export const distributionSchema = z.object({
	mean: z.number(),
	/** [probability, value] */
	quantiles: z.array(z.tuple([probability, z.number()])),
	/** the shortest interval that holds 95 % of the trees */
	highestDensity: z.tuple([z.number(), z.number()])
});

export const treesBlockSchema = z.object({
	/** trees used, after burn-in and thinning */
	count: z.number().int(),
	inText: z.number().int(),
	burnIn: z.number().int(),
	thin: z.number().int(),
	slopes: distributionSchema,
	intercepts: distributionSchema,
	r: distributionSchema,
	rootAge: distributionSchema,
	/** of the statistic averaged over the trees under the same shuffles, in the tail of the plan */
	p: probability,
	/** share of trees with slope < 0 */
	shareBelow: probability,
	/** the commonest root split */
	deepestSplit: z.object({ sides: z.array(z.number().int()), share: probability }),
	/** internal nodes of the tree that is drawn: share of trees that hold the clade, 95 % interval of its age in those */
	nodes: z.array(z.object({ node: z.number().int(), share: probability, age: z.tuple([z.number(), z.number()]).nullable() })),
	/** lines of single trees, evenly thinned, at most 200 */
	lines: z.array(z.object({ slope: z.number(), intercept: z.number() }))
});

/** One more statistic under the same shuffles, with p adjusted by the minimum over all that were declared. */
export const alsoTestedSchema = z.object({
	statistic: z.enum(STATISTICS),
	observed: z.number(),
	p: probability,
	...tails,
	pAdjusted: probability,
	withinDeepestSplit: z.object({ ...tails, exact: z.boolean() }).nullable()
});

export const partialBlockSchema = z.object({
	/** partial correlation of overlap and age after allowing for the covariates */
	r: z.number(),
	/** residuals of the null model permuted; in the tail of the plan */
	p: probability,
	...tails,
	/** whole overlaps permuted instead, as a check */
	raw: z.object({ p: probability, ...tails }),
	/** every relabelling of the species */
	exact: z.boolean(),
	/** n! when exact, else shuffles */
	count: z.number().int()
});

export const matrixRegressionBlockSchema = z.object({
	/** overlap where age and covariates are 0: far outside the data */
	intercept: z.number(),
	/** how age stands in the regression */
	ageScale: z.enum(['plain', 'log2']),
	/** `age` first, then the covariates by their labels; p by double semi-partialing, two-sided */
	coefficients: z.array(
		z.object({
			name: z.string(),
			estimate: z.number(),
			/** null where nothing is left of the overlaps to measure by */
			t: z.number().nullable(),
			p: probability,
			...tails,
			varianceInflation: z.number(),
			/** correlation with age; null for age itself */
			rWithAge: z.number().nullable(),
			/** ln(1 + value) in place of the value */
			scale: z.enum(['plain', 'log']).nullable()
		})
	),
	rSquared: probability,
	/** of R², upper tail */
	p: probability,
	/** R² that only age explains, that only the covariates explain, and that either does; shared may be negative */
	unique: z.object({ age: z.number(), ageP: probability, covariates: z.number(), shared: z.number() })
});

export const cladeRowSchema = z.object({
	/** preorder index in the pruned tree; null for a declared group that is no clade of it */
	node: z.number().int().nullable(),
	label: z.string(),
	age: z.number().nullable(),
	tips: z.number().int(),
	/** positions in tree order */
	members: z.array(z.number().int()),
	declared: z.boolean(),
	meanWithin: z.number(),
	meanBetween: z.number(),
	difference: z.number(),
	p: probability,
	pAdjusted: probability,
	/** shuffles among the species of the clade above it only; null where that cannot be asked, `whyNotBeyond` says why */
	pBeyondParent: probability.nullable(),
	/** adjusted for all clades asked about; below the root from `p`; null where no p could be small enough */
	pBeyondParentAdjusted: probability.nullable(),
	whyNotBeyond: z.string().optional(),
	/** the clade above it; null for a declared group that is no clade */
	parent: z.object({ node: z.number().int(), label: z.string(), tips: z.number().int() }).nullable(),
	smallestP: probability,
	/** whether an adjusted p within the level was within reach; `whyNotTestable` says why not */
	testable: z.boolean(),
	whyNotTestable: z.string().optional(),
	/** both adjusted p-values are within the level: what is marked on the tree */
	holds: z.boolean()
});

/** How the clades were tested together. */
export const cladeTestSchema = z.object({
	exact: z.boolean(),
	/** n! when exact, else shuffles */
	count: z.number().int(),
	minTips: z.number().int().nullable()
});

export const sistersBlockSchema = z.object({
	cherries: z.number().int(),
	meanCherries: z.number(),
	others: z.number().int(),
	meanOthers: z.number()
});

export const ageClassSchema = z.object({
	from: z.number(),
	to: z.number(),
	nodes: z.number().int(),
	pairs: z.number().int(),
	mean: z.number(),
	/** 2.5 %, 50 % and 97.5 % of the shuffled means */
	shuffled: z.tuple([z.number(), z.number(), z.number()])
});

const FALL_WORDS = ['more-alike', 'follows', 'less-alike-then-level'] as const;

/** What the overlaps look like beside a random walk of niche centres, for each number of niche axes. */
export const fallBlockSchema = z.object({
	fits: z.array(
		z.object({
			axes: z.number().int(),
			/** unit of the tree; null when the curve does not reach one half before the root */
			halfOverlapAge: z.number().nullable(),
			/** 5 and 95 % by parametric bootstrap; null beyond the root */
			range: z.tuple([z.number().nullable(), z.number().nullable()]),
			/** [age, overlap] from 0 to the root */
			curve: z.array(z.tuple([z.number(), z.number()])),
			shape: z.object({
				word: z.enum(FALL_WORDS),
				/** mean residual of the youngest third of the nodes */
				youngResidual: z.number(),
				p: probability,
				/** two-sided p, calibrated on simulated random walks; `size` is how often the uncalibrated word would be the same for one */
				size: probability
			})
		})
	),
	/** half-overlap age (one axis) of the same overlaps o over a floor shared by all pairs, floor + (1 - floor) o, or under a ceiling, ceiling · o */
	withFloor: z.object({ floor: z.number(), halfOverlapAge: z.number().nullable() }),
	withCeiling: z.object({ ceiling: z.number(), halfOverlapAge: z.number().nullable() }),
	simulations: z.number().int(),
	/** of large trees only some species, evenly spaced in tree order, are simulated */
	speciesSimulated: z.number().int()
});

export const influenceBlockSchema = z.object({
	/** in tree order: the slope over all pairs without that species; null where it is undefined */
	slopes: z.array(z.object({ species: z.string(), slope: z.number().nullable() })),
	range: z.tuple([z.number(), z.number()]),
	mostInfluential: z.string()
});

/** How often each statistic would find a random walk on this tree: a grid fixed beforehand, never the fitted effect. */
export const powerBlockSchema = z.object({
	simulations: z.number().int(),
	shuffles: z.number().int(),
	/** of large trees only some species, evenly spaced in tree order, are simulated */
	speciesSimulated: z.number().int(),
	/** one-sided level: half of the plan's when it asked for both sides */
	alpha: z.number(),
	/** expected spread at the root, variance over 4 s² of the niche, and number of niche axes */
	truths: z.array(z.object({ theta: z.number(), axes: z.number().int() })),
	rows: z.array(z.object({ statistic: z.enum(STATISTICS), power: z.array(probability) })),
	/** largest of all entries */
	standardError: z.number(),
	recommended: z.enum(STATISTICS)
});

const modelSchema = z.object({
	model: z.enum(['brownian', 'white-noise', 'lambda', 'ornstein-uhlenbeck', 'early-burst']),
	logLikelihood: z.number(),
	parameters: z.number().int(),
	aicc: z.number().nullable(),
	weight: z.number().nullable(),
	/** λ, the half-life in the unit of the tree, or the rate of change; null for the others */
	estimate: z.number().nullable(),
	/** the search ran into its end: here no different from a simpler model */
	atBound: z.boolean()
});

export const signalVariableSchema = z.object({
	variable: z.string(),
	/** position, or what can make overlap fall by itself */
	role: z.enum(['position', 'breadth', 'records', 'range-size']),
	species: z.number().int(),
	leftOut: z.array(z.string()),
	k: z.object({
		value: z.number(),
		/** species shuffled: more signal than none */
		p: probability,
		exact: z.boolean(),
		/** arrangements of the species, or shuffles */
		count: z.number().int(),
		/** Holm's adjustment over the niche positions of the plan; p itself for the others */
		pAdjusted: probability,
		/** simulated random walks: more alike than a random walk, upper tail */
		pAboveRandomWalk: probability
	}),
	lambda: z
		.object({
			estimate: z.number(),
			interval: z.tuple([probability, probability]),
			pAgainst0: probability,
			pAgainst1: probability
		})
		.nullable(),
	models: z.array(modelSchema),
	measurementError: z.boolean(),
	notes: z.array(z.string())
});
export const signalBlockSchema = z.object({ table: z.string(), variables: z.array(signalVariableSchema) });

export type TreesBlock = z.infer<typeof treesBlockSchema>;
export type Distribution = z.infer<typeof distributionSchema>;
export type AlsoTested = z.infer<typeof alsoTestedSchema>;
export type PartialBlock = z.infer<typeof partialBlockSchema>;
export type MatrixRegressionBlock = z.infer<typeof matrixRegressionBlockSchema>;
export type CladeRow = z.infer<typeof cladeRowSchema>;
export type CladeTestBlock = z.infer<typeof cladeTestSchema>;
export type SistersBlock = z.infer<typeof sistersBlockSchema>;
export type AgeClass = z.infer<typeof ageClassSchema>;
export type FallBlock = z.infer<typeof fallBlockSchema>;
export type InfluenceBlock = z.infer<typeof influenceBlockSchema>;
export type PowerBlock = z.infer<typeof powerBlockSchema>;
export type SignalBlock = z.infer<typeof signalBlockSchema>;
