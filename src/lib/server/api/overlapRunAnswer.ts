import type { z } from 'zod';
import type { overlapRunAnswerSchema } from '#lib/contracts/answers.ts';
import { overlapSummary } from '#lib/overlap/overlapSummary.ts';
import type { PairMatrix } from '#lib/overlap/pairMatrix.ts';
import { matrixOf, type OverlapRun } from '#lib/server/repositories/overlapRunRows.ts';
import { squareRows } from './squareRows.ts';

type Answer = z.infer<typeof overlapRunAnswerSchema>;

export function overlapRunAnswer(run: OverlapRun): Answer {
	const matrix = matrixOf(run);
	const { id, label, measure, species, reading, remarks } = run;
	return {
		id,
		label,
		status: 'finished',
		measure,
		species: [...species],
		values: squareRows(matrix.values, species.length).map((row) => row.map((value) => (Number.isNaN(value) ? null : value))),
		summary: summaryOf(matrix, run.lower),
		reading,
		remarks: [...remarks]
	};
}

function summaryOf(matrix: PairMatrix, lower: Float64Array): Answer['summary'] {
	if (lower.every((value) => Number.isNaN(value))) {
		const none = { min: null, max: null, mean: null, median: null };
		return { species: matrix.species.length, pairs: 0, missing: lower.length, ...none };
	}
	return overlapSummary(matrix);
}
