import type { StudyAnswer, studyAnswerSchema } from '#lib/contracts/answers.ts';
import type { z } from 'zod';
import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import type { Study } from '#lib/server/repositories/studies.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';

export function studyAnswer({ id, title, question, labId, isExample, createdAt, changedAt }: Study): StudyAnswer {
	return { id, title, question, lab: labId, isExample, createdAt, changedAt };
}

type Parts = Omit<z.infer<typeof studyAnswerSchema>, keyof StudyAnswer>;

/** What a study holds, newest first. */
export async function listedParts(access: Access): Promise<Parts> {
	return {
		treeSets: (await treeSets.list(access)).map(({ id, label, createdAt, treeCount, tipCount }) => ({
			id,
			label,
			createdAt,
			treeCount,
			tipCount
		})),
		overlapRuns: (await overlapRuns.list(access)).map(({ id, label, createdAt, measure, species }) => ({
			id,
			label,
			createdAt,
			measure,
			speciesCount: species.length
		})),
		covariates: (await covariates.list(access)).map(({ id, label, createdAt, species }) => ({
			id,
			label,
			createdAt,
			speciesCount: species.length
		})),
		nicheTables: (await nicheTables.list(access)).map(({ id, label, createdAt, variables, species }) => ({
			id,
			label,
			createdAt,
			variables: variables.map(({ name }) => name),
			speciesCount: species.length
		})),
		analyses: (await analyses.list(access)).map(({ id, status, createdAt }) => ({ id, status, createdAt })),
		reports: (await reports.list(access)).map(({ id, title, analysisId, createdAt }) => ({
			id,
			title,
			analysis: analysisId,
			createdAt
		}))
	};
}
