import type { z } from 'zod';
import type { covariateAnswerSchema } from '#lib/contracts/answers.ts';
import type { Covariate } from '#lib/server/repositories/covariateRows.ts';
import { symmetricMatrix } from '#lib/statistics/pairValues.ts';
import { squareRows } from './squareRows.ts';

export function covariateAnswer({
	id,
	label,
	species,
	lower,
	reading,
	remarks
}: Covariate): z.infer<typeof covariateAnswerSchema> {
	const rows = squareRows(symmetricMatrix(lower, species.length, Number.NaN), species.length);
	return {
		id,
		label,
		species: [...species],
		values: rows.map((row) => row.map((value) => (Number.isNaN(value) ? null : value))),
		reading,
		remarks: [...remarks]
	};
}
