import type { z } from 'zod';
import type { nicheTableAnswerSchema } from '#lib/contracts/answers.ts';
import { storedVariable, type KeptNicheTable } from '#lib/server/repositories/nicheTableRows.ts';

export function nicheTableAnswer({
	id,
	label,
	species,
	variables,
	remarks
}: KeptNicheTable): z.infer<typeof nicheTableAnswerSchema> {
	return { id, label, species: [...species], variables: variables.map(storedVariable), remarks: [...remarks] };
}
