import { z } from 'zod';

/** An empty field of a form arrives as empty text. */
const blankAsAbsent = (value: unknown) => (value === '' ? undefined : value);
const lab = z.preprocess(blankAsAbsent, z.string().max(64).optional());

const title = z
	.string('Give the study a title, such as the name of the clade.')
	.trim()
	.min(1, 'Give the study a title, such as the name of the clade.')
	.max(200, 'A title has at most 200 characters; shorten it, or say more in the question.');
const question = z.string().trim().max(2000, 'A question has at most 2,000 characters; shorten it.').default('');

export const newStudyForm = z.object({ title, question, lab });
export const renameStudyForm = z.object({ title, question });
export const copyStudyForm = z.object({ lab });
export const restoreStudyForm = z.object({ id: z.string().min(1).max(64) });
