import { z } from 'zod';

const name = z.string().min(1).max(500);
const why = z.string().trim().max(500, 'A reason has at most 500 characters; shorten it.').default('');

/** A species is given a tip; without `to`, the choice was left open. */
export const pairNamesForm = z.object({ from: name, to: z.string().min(1, 'Choose the name it belongs to.').max(500), why });

/** One or several names are left out, for one reason. Names stand one a line: a form sends a list most simply so. */
export const leaveOutForm = z.object({
	names: z
		.string()
		.transform((text) => text.split(/\r?\n/).filter((line) => line !== ''))
		.pipe(z.array(name).min(1).max(10_000)),
	why
});

export const withdrawForm = z.object({ names: leaveOutForm.shape.names });
export const acceptAllForm = z.object({ kind: z.enum(['probable', 'tidied']) });
