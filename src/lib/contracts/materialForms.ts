import { z } from 'zod';
import { AGE_UNITS, TREE_SET_KINDS, type Confirm } from './materials.ts';
import { measureSchema } from './measureSchema.ts';

/** An empty field of a form arrives as empty text. */
const answer = <Schema extends z.ZodType>(schema: Schema) =>
	z.preprocess((value) => (value === '' ? undefined : value), schema.optional());

const wholeNumber = (least: number, message: string) => z.coerce.number(message).int(message).min(least, message);

/** What a person answers about a text that is looked at; an answer left open is absent. */
export const answersForm = z.object({
	readAs: answer(z.enum(['trees', 'matrix'])),
	ageUnit: answer(z.enum(AGE_UNITS)),
	treeKind: answer(z.enum(TREE_SET_KINDS)),
	burnIn: answer(wholeNumber(0, 'Give the number of trees to leave out at the start: 0 or more.')),
	thin: answer(wholeNumber(1, 'Give which trees to keep: 1 for every tree, 10 for every tenth.')),
	spread: answer(z.literal('yes')),
	measure: answer(measureSchema),
	valueKind: answer(z.enum(['similarity', 'distance'])),
	scale: answer(z.enum(['fraction', 'percent'])),
	triangle: answer(z.enum(['average', 'upper', 'lower']))
});
export type Answers = z.infer<typeof answersForm>;

const label = z
	.string('Give it a name, such as what it was made from.')
	.trim()
	.min(1, 'Give it a name, such as what it was made from.')
	.max(200, 'A name has at most 200 characters; shorten it.');

export const keepForm = answersForm.extend({ label });

/** A tree set or an overlap run of the study, as a form names it: `trees:ID`, `matrix:ID`. */
export const materialSchema = z
	.string()
	.regex(/^(trees|matrix):[\w-]{1,64}$/, 'That is no material of this study.')
	.transform((text): MaterialName => ({
		kind: text.startsWith('trees:') ? 'trees' : 'matrix',
		id: text.slice(text.indexOf(':') + 1)
	}));
export type MaterialName = { readonly kind: 'trees' | 'matrix'; readonly id: string };

export const materialForm = z.object({ material: materialSchema });
export const renameMaterialForm = z.object({ material: materialSchema, label });
export const settleMaterialForm = answersForm.extend({ material: materialSchema });

/** The answers that settle how a text is read. */
export function confirmOf({ spread, valueKind, scale, triangle }: Answers): Confirm {
	return {
		...(spread === undefined ? {} : { spread: true as const }),
		...(valueKind === undefined ? {} : { kind: valueKind }),
		...(scale === undefined ? {} : { scale }),
		...(triangle === undefined ? {} : { triangle })
	};
}
