import { z } from 'zod';
import {
	ALTERNATIVES,
	CLADE_LIMIT,
	CLADES_LIMIT,
	COVARIATES_LIMIT,
	PERMUTATION_LIMIT,
	planRequestSchema,
	SEED_LIMIT,
	STATISTICS,
	type Plan,
	type PlanRequest
} from './plan.ts';

/** The fields of the plan as a form and an address hold them: all text. */
export const PLAN_FIELDS = [
	'treeSet',
	'tree',
	'treeNumber',
	'overlapRun',
	'species',
	'statistic',
	'alternative',
	'transform',
	'alpha',
	'permutations',
	'seed',
	'alsoTest',
	'clades',
	'cladeTips',
	'declared',
	'covariates',
	'signal',
	'signalTable'
] as const;
export type PlanField = (typeof PLAN_FIELDS)[number];
export type PlanValues = Readonly<Record<PlanField, string>>;

/** Fields that a plan begins without. */
export const UNASKED = {
	treeNumber: '0',
	alsoTest: '',
	clades: '',
	cladeTips: '3',
	declared: '',
	covariates: '',
	signal: '',
	signalTable: ''
} as const satisfies Partial<PlanValues>;

const wholeNumber = (rule: string, { from, to }: { from: number; to: number }) =>
	z
		.string()
		.trim()
		.regex(/^\d[\d,\s]*$/, rule)
		.transform((text) => Number(text.replaceAll(/[,\s]/g, '')))
		.pipe(z.number(rule).int(rule).min(from, rule).max(to, rule));

const linesOf = (text: string) =>
	text
		.split(/\r?\n/)
		.map((line) => line.trim())
		.filter((line) => line !== '');

/** One name a line; nothing means every species that tree and matrix share. */
const speciesText = z.string().transform((text) => {
	const names = linesOf(text);
	return names.length === 0 ? ('shared' as const) : [...new Set(names)];
});

const SEED_RULE = `A seed is a whole number from 0 to ${SEED_LIMIT.toLocaleString('en')}; the same seed gives the same shuffles.`;
const SHUFFLE_RULE = `Shuffles are a whole number from 1 to ${PERMUTATION_LIMIT.toLocaleString('en')}.`;
const ALPHA_RULE = 'The level is a number between 0 and 1, such as 0.05.';

const TREE_RULE = 'Trees of a set are counted from 0: write a whole number.';
const treeIndex = wholeNumber(TREE_RULE, { from: 0, to: 9999 });

/** A clade a line, its species parted by commas or semicolons. */
const cladesText = z
	.string()
	.transform((text) =>
		linesOf(text).map((line) =>
			line
				.split(/[,;]/)
				.map((name) => name.trim())
				.filter((name) => name !== '')
		)
	)
	.pipe(
		z
			.array(z.array(z.string()).min(2, 'A declared clade has at least 2 species: a line each, parted by commas.'))
			.max(CLADES_LIMIT, `At most ${CLADES_LIMIT} clades can be declared.`)
	);

const CLADE_RULE = `The fewest species of a clade are a whole number from 2 to ${CLADE_LIMIT.toLocaleString('en')}.`;

const COVARIATE_RULE = `A plan allows for at most ${COVARIATES_LIMIT} covariates. Choose fewer.`;

export const planForm = z
	.object({
		treeSet: z.string('Choose a tree.').min(1, 'Choose a tree.'),
		/** all trees of the set, the one that `treeNumber` names, or a number itself, as an address may have it; a set of one asks nothing */
		tree: z.union([z.enum(['all', 'one']), treeIndex], TREE_RULE).default('all'),
		treeNumber: treeIndex.default(0),
		overlapRun: z.string('Choose a matrix.').min(1, 'Choose a matrix.'),
		species: speciesText,
		statistic: z.enum(STATISTICS, 'Choose what the relation is judged by.'),
		alternative: z.enum(ALTERNATIVES, 'Choose the direction that is asked about.'),
		transform: z.enum(['none', 'logit'], 'Choose the scale of the overlap.'),
		alpha: z.string().trim().transform(Number).pipe(z.number(ALPHA_RULE).gt(0, ALPHA_RULE).lt(1, ALPHA_RULE)),
		permutations: wholeNumber(SHUFFLE_RULE, { from: 1, to: PERMUTATION_LIMIT }),
		seed: wholeNumber(SEED_RULE, { from: 0, to: SEED_LIMIT }),
		alsoTest: z
			.string()
			.transform((text) => [...new Set(linesOf(text))])
			.pipe(z.array(z.enum(STATISTICS, 'Choose among the statistics that are offered.')))
			.default([]),
		clades: z.enum(['', 'all', 'declared'], 'Choose which clades are looked at.').default(''),
		cladeTips: wholeNumber(CLADE_RULE, { from: 2, to: CLADE_LIMIT }).default(3),
		declared: cladesText.default([]),
		covariates: z
			.string()
			.transform((text) => [...new Set(linesOf(text))])
			.pipe(z.array(z.string()).max(COVARIATES_LIMIT, COVARIATE_RULE))
			.default([]),
		/** names of niche positions, a line each */
		signal: z
			.string()
			.transform((text) => [...new Set(linesOf(text))])
			.default([]),
		signalTable: z.string().default('')
	})
	.refine(({ clades, declared }) => clades !== 'declared' || declared.length > 0, {
		path: ['declared'],
		message: 'Name at least one clade: a line each, its species parted by commas.'
	})
	.transform(({ clades, cladeTips, declared, tree, treeNumber, signal, signalTable, ...fields }): PlanRequest => {
		const asked = { '': null, all: { minTips: cladeTips }, declared: { minTips: cladeTips, declared } }[clades];
		const table = signalTable === '' ? {} : { table: signalTable };
		return planRequestSchema.parse({
			...fields,
			tree: tree === 'one' ? treeNumber : tree,
			clades: asked,
			signal: signal.length === 0 ? null : { variables: signal, ...table }
		});
	});

/** A stored plan as the fields of the form. */
export function planValues(plan: Plan): PlanValues {
	return {
		treeSet: plan.treeSet,
		tree: plan.tree === 'all' ? 'all' : 'one',
		treeNumber: plan.tree === 'all' ? UNASKED.treeNumber : String(plan.tree),
		overlapRun: plan.overlapRun,
		species: plan.species === 'shared' ? '' : plan.species.join('\n'),
		statistic: plan.statistic,
		alternative: plan.alternative,
		transform: plan.transform,
		alpha: String(plan.alpha),
		permutations: String(plan.permutations),
		seed: String(plan.seed),
		alsoTest: plan.alsoTest.join('\n'),
		clades: plan.clades === null ? '' : plan.clades.declared === undefined ? 'all' : 'declared',
		cladeTips: String(plan.clades?.minTips ?? UNASKED.cladeTips),
		declared: (plan.clades?.declared ?? []).map((names) => names.join(', ')).join('\n'),
		covariates: plan.covariates.join('\n'),
		signal: (plan.signal?.variables ?? []).join('\n'),
		signalTable: plan.signal?.table ?? ''
	};
}
