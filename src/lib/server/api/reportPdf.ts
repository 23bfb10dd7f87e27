import PDFDocument from 'pdfkit';
import drawSvg from 'svg-to-pdfkit';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { FigureSettings } from '#lib/server/exports/figureSettings.ts';
import { exportFont } from '#lib/server/exports/exportFonts.ts';
import { drawPlate, type PlateSvg } from '#lib/server/exports/plateSvg.ts';

export type ReportWords = {
	readonly title: string;
	readonly caption: string;
	readonly notes: string;
	/** what had been seen of the matrix before the plan was written; '' where that was not kept */
	readonly seenBefore: string;
};

const POINTS_PER_MM = 72 / 25.4;
/** A4 less two margins is 174 mm, the widest of the journal widths. */
const MARGIN = 18 * POINTS_PER_MM;
const GAP = 12;
const INK = '#16232b';
const SECOND_INK = '#56646c';

/** A report on A4: title, finding, plate and caption; then notes, what the result does not show, and how it was made. */
export async function renderReportPdf(
	result: AnalysisResult,
	words: ReportWords,
	figure: Partial<FigureSettings>
): Promise<Buffer> {
	const info = { Title: words.title, Creator: 'Kithline' };
	const document = new PDFDocument({ size: 'A4', margin: MARGIN, info, lang: 'en', displayTitle: true, autoFirstPage: false });
	const finished = collected(document);
	registerFonts(document);
	document.addPage();
	heading(document, words.title);
	paragraph(document, result.finding.sentence, { size: 10 });
	placePlate(document, drawPlate(result, figure, 'pt'));
	paragraph(document, words.caption, { size: 8 });
	section(document, 'Notes', words.notes);
	section(document, 'What this does not show', result.finding.limits.join('\n'));
	section(document, 'Cautions', result.finding.cautions.map(({ message }) => message).join('\n'));
	section(document, 'What had been seen before the plan', words.seenBefore);
	section(document, 'How it was made', origin(result));
	document.end();
	return finished;
}

type Pdf = InstanceType<typeof PDFDocument>;

function collected(document: Pdf): Promise<Buffer> {
	const parts: Buffer[] = [];
	return new Promise((resolve, reject) => {
		document.on('data', (part: Buffer) => parts.push(part));
		document.on('end', () => resolve(Buffer.concat(parts)));
		document.on('error', reject);
	});
}

function registerFonts(document: Pdf): void {
	document.registerFont('Arimo', exportFont('Arimo-Regular.ttf'));
	document.registerFont('Arimo-Italic', exportFont('Arimo-Italic.ttf'));
	document.registerFont('Arimo-Bold', exportFont('Arimo-Bold.ttf'));
	document.registerFont('Arimo-BoldItalic', exportFont('Arimo-BoldItalic.ttf'));
}

function heading(document: Pdf, text: string): void {
	document.font('Arimo-Bold').fontSize(16).fillColor(INK).text(text, { lineGap: 2 });
	document.moveDown(0.4);
}

function paragraph(document: Pdf, text: string, { size }: { size: number }): void {
	document.font('Arimo').fontSize(size).fillColor(INK).text(text, { lineGap: 1.5 });
}

/** A section without words has no heading either; a heading is not left alone at the foot of a page. */
function section(document: Pdf, title: string, text: string): void {
	if (text.trim() === '') return;
	const foot = document.page.height - MARGIN;
	document.moveDown(1);
	if (document.y > foot - 40) document.addPage();
	document.font('Arimo-Bold').fontSize(9).fillColor(SECOND_INK).text(title);
	document.moveDown(0.2);
	paragraph(document, text, { size: 9 });
}

/** A plate that is too wide or too high for the page is drawn smaller, never cut. */
function placePlate(document: Pdf, { svg, widthPt, heightPt }: PlateSvg): void {
	const wide = document.page.width - 2 * MARGIN;
	const high = document.page.height - 2 * MARGIN;
	const scale = Math.min(1, wide / widthPt, high / heightPt);
	const [width, height] = [widthPt * scale, heightPt * scale];
	document.moveDown(1);
	if (document.y + height > document.page.height - MARGIN) document.addPage();
	const top = document.y;
	drawSvg(document, svg, MARGIN, top, { width, height, assumePt: true, fontCallback: fontFor });
	document.x = MARGIN;
	document.y = top + height + GAP;
}

function fontFor(_family: string, bold: boolean, italic: boolean): string {
	return `Arimo${bold || italic ? '-' : ''}${bold ? 'Bold' : ''}${italic ? 'Italic' : ''}`;
}

function origin({ permutation, engine }: AnalysisResult): string {
	const count = new Intl.NumberFormat('en').format(permutation.count);
	const how = permutation.exact ? `all ${count} relabellings` : `${count} shuffles, seed ${engine.seed}`;
	return `Kithline ${engine.version}: statistic ${permutation.statistic}, ${how}. Equal inputs, plan and seed give the same numbers.`;
}
