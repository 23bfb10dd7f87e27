import { z } from 'zod';
import { NICHE_ROLES } from '#lib/overlap/nicheTable.ts';

export const nicheTableRequestSchema = z.strictObject({
	label: z.string().trim().min(1).max(200),
	/** first column species, first row names of the variables; `temperature_se` holds standard errors of `temperature` */
	csv: z.string(),
	/** what columns tell, where the names of the columns do not */
	roles: z.record(z.string(), z.enum(NICHE_ROLES)).optional()
});
export type NicheTableRequest = z.infer<typeof nicheTableRequestSchema>;

/** A variable as it is stored: JSON has no NaN, so a missing value is null. */
export const nicheVariableSchema = z.object({
	name: z.string(),
	role: z.enum(NICHE_ROLES),
	values: z.array(z.number().nullable()),
	standardErrors: z.array(z.number().nullable()).nullable()
});
export type StoredNicheVariable = z.infer<typeof nicheVariableSchema>;
