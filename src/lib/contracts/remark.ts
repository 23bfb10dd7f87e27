import { z } from 'zod';

export const placeSchema = z.object({
	line: z.number().int().positive().optional(),
	column: z.number().int().positive().optional(),
	name: z.string().optional(),
	otherName: z.string().optional(),
	tree: z.number().int().nonnegative().optional(),
	file: z.string().optional()
});

export const remarkSchema = z.object({
	level: z.enum(['information', 'look', 'settle']),
	code: z.string(),
	message: z.string(),
	where: placeSchema.optional()
});
