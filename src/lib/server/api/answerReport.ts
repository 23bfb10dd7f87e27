import { writeCaption } from '#lib/analysis/words/caption.ts';
import { contextSentences } from '#lib/analysis/words/contextSentences.ts';
import { figureSettingsSchema } from '#lib/contracts/report.ts';
import type { Access } from '#lib/server/access.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import { fileResponse, plateSettings } from './answerPlate.ts';
import type { FinishedAnalysis } from './finished.ts';
import { found } from './found.ts';
import { noteExport } from './noteExport.ts';
import { renderReportPdf, type ReportWords } from './reportPdf.ts';

/**
 * The newest report of an analysis as a PDF, or the one asked for; without a saved one, the words written for the result.
 * @throws {Refusal} 404 for a report that is not of this analysis
 */
export async function answerReport(access: Access, analysis: FinishedAnalysis, asked: string | null): Promise<Response> {
	const saved = await reports.list(access, { analysis: analysis.id });
	const report = asked === null ? saved[0] : found(saved.find(({ id }) => id === asked) ?? null);
	const { result } = analysis;
	const written = report ?? { title: result.finding.title, caption: writeCaption(result), notes: '' };
	const seenBefore = analysis.context === null ? '' : contextSentences(analysis.context, 'reader').join(' ');
	const words: ReportWords = { ...written, seenBefore };
	const figure = report?.figure ?? figureSettingsSchema.parse({});
	const pdf = await renderReportPdf(result, words, plateSettings(result, figure));
	await noteExport(access, { analysis: analysis.id, file: 'report.pdf', ...(report === undefined ? {} : { report: report.id }) });
	return fileResponse(pdf, { type: 'application/pdf', file: 'report.pdf' });
}
