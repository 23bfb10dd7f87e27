import PDFDocument from 'pdfkit';
import drawSvg from 'svg-to-pdfkit';
import type { PlateInput } from '#lib/figures/plateModel.ts';
import type { FigureSettings } from './figureSettings.ts';
import { exportFont } from './exportFonts.ts';
import { drawPlate } from './plateSvg.ts';

/** The plate as a one-page PDF of exactly its size, fonts embedded, text selectable. */
export function renderPlatePdf(result: PlateInput, chosen: Partial<FigureSettings> = {}): Promise<Buffer> {
	const { svg, widthPt, heightPt } = drawPlate(result, chosen, 'pt');
	const document = new PDFDocument({ size: [widthPt, heightPt], margin: 0, info: { Title: 'Plate', Creator: 'Kithline' } });
	document.registerFont('Arimo', exportFont('Arimo-Regular.ttf'));
	document.registerFont('Arimo-Italic', exportFont('Arimo-Italic.ttf'));
	document.registerFont('Arimo-Bold', exportFont('Arimo-Bold.ttf'));
	document.registerFont('Arimo-BoldItalic', exportFont('Arimo-BoldItalic.ttf'));
	const chunks: Buffer[] = [];
	const finished = new Promise<Buffer>((resolve, reject) => {
		document.on('data', (chunk: Buffer) => chunks.push(chunk));
		document.on('end', () => resolve(Buffer.concat(chunks)));
		document.on('error', reject);
	});
	drawSvg(document, svg, 0, 0, { width: widthPt, height: heightPt, assumePt: true, fontCallback: fontFor });
	document.end();
	return finished;
}

function fontFor(_family: string, bold: boolean, italic: boolean): string {
	if (bold && italic) return 'Arimo-BoldItalic';
	if (bold) return 'Arimo-Bold';
	return italic ? 'Arimo-Italic' : 'Arimo';
}
