import { z } from 'zod';
import { COVARIATE_SCALES } from './covariates.ts';
import { AGE_UNITS, TREE_SET_KINDS, type Confirm } from './materials.ts';
import { measureSchema } from './measureSchema.ts';
import { TIP_PLACEMENTS, treeAboutSchema, type TreeAbout } from './treeAbout.ts';

/** An empty field of a form arrives as empty text. */
const answer = <Schema extends z.ZodType>(schema: Schema) =>
	z.preprocess((value) => (value === '' ? undefined : value), schema.optional());

const wholeNumber = (least: number, message: string) => z.coerce.number(message).int(message).min(least, message);

/** What a text may be kept as. */
export const MATERIAL_KINDS = ['trees', 'matrix', 'covariate', 'niches'] as const;
export type MaterialKind = (typeof MATERIAL_KINDS)[number];

const BURN_IN_RULE = 'Give the trees to leave out at the start: a number from 0, or a share such as 10 %.';

/** A number of trees, or a share below 1 where a per cent sign says so. */
const burnInText = z.coerce
	.string()
	.trim()
	.regex(/^(?:\d+|\d{1,2}(?:\.\d+)?\s*%)$/, BURN_IN_RULE)
	.transform((text) => (text.endsWith('%') ? Number.parseFloat(text) / 100 : Number(text)));

/** What a person answers about a text that is looked at; an answer left open is absent. */
export const answersForm = z.object({
	readAs: answer(z.enum(MATERIAL_KINDS)),
	ageUnit: answer(z.enum(AGE_UNITS)),
	treeKind: answer(z.enum(TREE_SET_KINDS)),
	burnIn: answer(burnInText),
	thin: answer(wholeNumber(1, 'Give which trees to keep: 1 for every tree, 10 for every tenth.')),
	spread: answer(z.literal('yes')),
	measure: answer(measureSchema),
	valueKind: answer(z.enum(['similarity', 'distance'])),
	scale: answer(z.enum(['fraction', 'percent'])),
	triangle: answer(z.enum(['average', 'upper', 'lower'])),
	covariateScale: answer(z.enum(COVARIATE_SCALES))
});
export type Answers = z.infer<typeof answersForm>;

const label = z
	.string('Give it a name, such as what it was made from.')
	.trim()
	.min(1, 'Give it a name, such as what it was made from.')
	.max(200, 'A name has at most 200 characters; shorten it.');

export const keepForm = answersForm.extend({ label });

/** A tree set, an overlap run or a covariate of the study, as a form names it: `trees:ID`, `matrix:ID`, `covariate:ID`; `niches:ID` is a table. */
export const materialSchema = z
	.string()
	.regex(/^(trees|matrix|covariate|niches):[\w-]{1,64}$/, 'That is no material of this study.')
	.transform((text): MaterialName => ({
		kind: MATERIAL_KINDS.find((kind) => text.startsWith(`${kind}:`)) ?? 'matrix',
		id: text.slice(text.indexOf(':') + 1)
	}));
export type MaterialName = { readonly kind: MaterialKind; readonly id: string };

export const materialForm = z.object({ material: materialSchema });
export const renameMaterialForm = z.object({ material: materialSchema, label });
export const settleMaterialForm = answersForm.extend({ material: materialSchema });

const SPECIES_RULE = 'Living species of the clade are a whole number, such as 31; leave it empty when nobody knows.';
const short = (what: string) => z.string().trim().max(1000, `${what} has at most 1,000 characters; shorten it.`).default('');

/** What only the author of a tree knows, as a form holds it: one placed tip a line. */
export const aboutTreeForm = z
	.object({
		material: materialSchema,
		speciesInClade: answer(z.coerce.number(SPECIES_RULE).int(SPECIES_RULE).min(1, SPECIES_RULE).max(1_000_000, SPECIES_RULE)),
		placement: z.enum(TIP_PLACEMENTS).default('unknown'),
		placedTips: z.string().default(''),
		calibration: short('What the ages rest on'),
		source: short('A source')
	})
	.transform(({ material, speciesInClade, placedTips, ...rest }) => {
		const tips = placedTips.split(/\r?\n/).map((line) => line.trim());
		const about: TreeAbout = treeAboutSchema.parse({
			...rest,
			speciesInClade: speciesInClade ?? null,
			placedTips: rest.placement === 'some-placed' ? [...new Set(tips.filter((tip) => tip !== ''))] : []
		});
		return { material, about };
	});

/** The answers that settle how a text is read. */
export function confirmOf({ spread, valueKind, scale, triangle }: Answers): Confirm {
	return {
		...(spread === undefined ? {} : { spread: true as const }),
		...(valueKind === undefined ? {} : { kind: valueKind }),
		...(scale === undefined ? {} : { scale }),
		...(triangle === undefined ? {} : { triangle })
	};
}
