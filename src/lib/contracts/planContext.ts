import { z } from 'zod';

/** How a person first came to see the values of an overlap run: bringing it, on its page, as a file, through the API. */
export const OPENING_WAYS = ['brought', 'page', 'file', 'script'] as const;

/**
 * What had been seen of the matrix when a plan was written down. It belongs to the plan and not to its hash: the same plan
 * gives the same numbers whoever had looked.
 */
export const planContextSchema = z.object({
	/** when the person who wrote the plan first saw the values here; null when they had not */
	opened: z.object({ at: z.iso.datetime(), by: z.enum(OPENING_WAYS) }).nullable(),
	/** other people who had seen them here */
	openedByOthers: z.number().int().nonnegative(),
	/** analyses of the matrix that had finished, those deleted since too */
	analysedBefore: z.number().int().nonnegative(),
	lastAnalysed: z.iso.datetime().nullable()
});

export type OpeningWay = (typeof OPENING_WAYS)[number];
export type PlanContext = z.infer<typeof planContextSchema>;
