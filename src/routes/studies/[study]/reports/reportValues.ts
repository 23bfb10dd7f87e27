import { FIGURE_WIDTHS_MM, figureSettingsSchema, type FigureSettings } from '#lib/contracts/report.ts';

/** The fields of a report as its form holds them: all text. */
export type ReportValues = {
	readonly title: string;
	readonly caption: string;
	readonly notes: string;
	readonly width: string;
	readonly widthMm: string;
	readonly age: string;
	readonly palette: string;
	readonly typeSizePt: string;
	readonly dpi: string;
};

type Words = { readonly title: string; readonly caption: string; readonly notes: string };

/** A report, or the proposal of one, as the fields of its form. */
export function reportValues({ title, caption, notes }: Words, figure?: FigureSettings): ReportValues {
	const { widthMm, age, palette, typeSizePt, dpi } = figure ?? figureSettingsSchema.parse({});
	const isJournalWidth = FIGURE_WIDTHS_MM.some((width) => width === widthMm);
	return {
		...{ title, caption, notes, age, palette },
		width: isJournalWidth ? String(widthMm) : 'custom',
		widthMm: String(widthMm),
		typeSizePt: String(typeSizePt),
		dpi: String(dpi)
	};
}
