declare module 'svg-to-pdfkit' {
	type Options = {
		readonly width?: number;
		readonly height?: number;
		readonly assumePt?: boolean;
		readonly fontCallback?: (family: string, bold: boolean, italic: boolean) => string;
	};
	/** Draws SVG text at a place of a page. */
	export default function drawSvg(
		document: PDFKit.PDFDocument,
		svg: string,
		...place: [x: number, y: number, options?: Options]
	): void;
}
