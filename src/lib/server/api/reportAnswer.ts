import type { ReportAnswer } from '#lib/contracts/answers.ts';
import type { Report } from '#lib/server/repositories/reports.ts';

export function reportAnswer({ id, analysisId, title, caption, notes, figure, createdAt, changedAt }: Report): ReportAnswer {
	return { id, analysis: analysisId, title, caption, notes, figure, createdAt, changedAt };
}
