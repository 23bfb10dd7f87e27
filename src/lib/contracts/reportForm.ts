import { z } from 'zod';
import { figureSettingsSchema, reportRequestSchema, type ReportRequest } from './report.ts';

const WIDTH_RULE = 'A figure is from 30 to 300 mm wide.';
const { age, palette, typeSizePt } = figureSettingsSchema.shape;

/** The form of a report: everything arrives as text; `width` is a journal width or “custom”, which reads `widthMm`. */
export const reportForm = z
	.object({
		title: z
			.string('Give the report a title.')
			.trim()
			.min(1, 'Give the report a title.')
			.max(300, 'A title has at most 300 characters; shorten it, or say more in the notes.'),
		caption: z.string().max(5000, 'A caption has at most 5,000 characters; move some of it to the notes.'),
		notes: z.string().max(20_000, 'Notes have at most 20,000 characters; keep the rest in a document of your own.').default(''),
		width: z.string(),
		widthMm: z.string().default(''),
		age: age.unwrap(),
		palette: palette.unwrap(),
		typeSizePt: z.coerce.number('Type is from 6 to 12 points.').pipe(typeSizePt.unwrap()),
		dpi: z.coerce.number('Choose a resolution.').pipe(figureSettingsSchema.shape.dpi.unwrap())
	})
	.transform(({ width, widthMm, ...rest }) => ({ ...rest, widthMm: Number(width === 'custom' ? widthMm : width) }))
	.refine(({ widthMm }) => widthMm >= 30 && widthMm <= 300, { path: ['widthMm'], message: WIDTH_RULE })
	.transform(({ title, caption, notes, ...figure }): ReportRequest =>
		reportRequestSchema.parse({ title, caption, notes, figure })
	);
