import type { z } from 'zod';
import type { analysisAnswerSchema } from '#lib/contracts/answers.ts';
import type { Analysis } from '#lib/server/repositories/analyses.ts';

type Answer = z.infer<typeof analysisAnswerSchema>;
type Changes = readonly { readonly code: string; readonly message: string }[];

export function analysisAnswer(analysis: Analysis, changes: Changes): Answer {
	const { id, status, plan, context, hash, createdAt, finishedAt, result, failure } = analysis;
	return {
		id,
		status,
		progress: progressOf(analysis),
		plan,
		seenBefore: context,
		hash,
		createdAt,
		finishedAt,
		...(result === null ? {} : { result }),
		...(failure === null ? {} : { failure }),
		outOfDate: [...changes],
		remarks: result?.remarks ?? []
	};
}

/** Only while it works: what is kept of a finished one is older than its end. New slopes belong to the stream of events. */
function progressOf({ progress, status }: Analysis): Answer['progress'] {
	if (progress === null || status !== 'working') return null;
	const { newSlopes: _, ...rest } = progress;
	return rest;
}
