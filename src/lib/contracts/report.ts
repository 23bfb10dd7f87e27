import { z } from 'zod';

/** Widths in millimetres that most journals ask for. */
export const FIGURE_WIDTHS_MM = [84, 129, 174] as const;

export const figureSettingsSchema = z.strictObject({
	widthMm: z.number().min(30).max(300).default(174),
	dpi: z.number().int().min(72).max(1200).default(600),
	/** at which end of the age axis the present stands */
	age: z.enum(['left', 'right']).default('left'),
	palette: z.enum(['kithline', 'cividis', 'viridis']).default('kithline'),
	typeSizePt: z.number().min(6).max(12).default(7)
});
export type FigureSettings = z.infer<typeof figureSettingsSchema>;

export const reportRequestSchema = z.strictObject({
	title: z.string().trim().min(1).max(300),
	caption: z.string().max(5000).optional(),
	notes: z.string().max(20_000).default(''),
	figure: figureSettingsSchema.prefault({})
});
export type ReportRequest = z.infer<typeof reportRequestSchema>;
