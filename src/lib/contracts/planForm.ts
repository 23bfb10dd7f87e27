import { z } from 'zod';
import {
	ALTERNATIVES,
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
	'overlapRun',
	'species',
	'statistic',
	'alternative',
	'transform',
	'alpha',
	'permutations',
	'seed'
] as const;
export type PlanField = (typeof PLAN_FIELDS)[number];
export type PlanValues = Readonly<Record<PlanField, string>>;

const wholeNumber = (rule: string, { from, to }: { from: number; to: number }) =>
	z
		.string()
		.trim()
		.regex(/^\d[\d,\s]*$/, rule)
		.transform((text) => Number(text.replaceAll(/[,\s]/g, '')))
		.pipe(z.number(rule).int(rule).min(from, rule).max(to, rule));

/** One name a line; nothing means every species that tree and matrix share. */
const speciesText = z.string().transform((text) => {
	const names = text
		.split(/\r?\n/)
		.map((line) => line.trim())
		.filter((line) => line !== '');
	return names.length === 0 ? ('shared' as const) : [...new Set(names)];
});

const SEED_RULE = `A seed is a whole number from 0 to ${SEED_LIMIT.toLocaleString('en')}; the same seed gives the same shuffles.`;
const SHUFFLE_RULE = `Shuffles are a whole number from 1 to ${PERMUTATION_LIMIT.toLocaleString('en')}.`;
const ALPHA_RULE = 'The level is a number between 0 and 1, such as 0.05.';

export const planForm = z
	.object({
		treeSet: z.string('Choose a tree.').min(1, 'Choose a tree.'),
		tree: wholeNumber('Trees of a set are counted from 0: write a whole number.', { from: 0, to: 9999 }),
		overlapRun: z.string('Choose a matrix.').min(1, 'Choose a matrix.'),
		species: speciesText,
		statistic: z.enum(STATISTICS, 'Choose what the relation is judged by.'),
		alternative: z.enum(ALTERNATIVES, 'Choose the direction that is asked about.'),
		transform: z.enum(['none', 'logit'], 'Choose the scale of the overlap.'),
		alpha: z.string().trim().transform(Number).pipe(z.number(ALPHA_RULE).gt(0, ALPHA_RULE).lt(1, ALPHA_RULE)),
		permutations: wholeNumber(SHUFFLE_RULE, { from: 1, to: PERMUTATION_LIMIT }),
		seed: wholeNumber(SEED_RULE, { from: 0, to: SEED_LIMIT })
	})
	.transform((fields): PlanRequest => planRequestSchema.parse(fields));

/** A stored plan as the fields of the form. */
export function planValues(plan: Plan): PlanValues {
	return {
		treeSet: plan.treeSet,
		tree: plan.tree === 'all' ? '0' : String(plan.tree),
		overlapRun: plan.overlapRun,
		species: plan.species === 'shared' ? '' : plan.species.join('\n'),
		statistic: plan.statistic,
		alternative: plan.alternative,
		transform: plan.transform,
		alpha: String(plan.alpha),
		permutations: String(plan.permutations),
		seed: String(plan.seed)
	};
}
