import { describe, expect, it } from 'vitest';
import { reportForm } from '#lib/contracts/reportForm.ts';
import { figureSettingsSchema } from '#lib/contracts/report.ts';
import { reportValues } from './reportValues.ts';

const words = { title: 'Frogs', caption: 'Fig.', notes: '' };

describe('reportValues', () => {
	// By property: what the form is filled with reads back as the same report.
	it.each([84, 129, 174, 111.5])('is undone by reading the form, at a width of %d mm', (widthMm) => {
		const figure = figureSettingsSchema.parse({ widthMm, age: 'right', palette: 'viridis', typeSizePt: 8.5, dpi: 300 });
		expect(reportForm.parse(reportValues(words, figure))).toEqual({ ...words, figure });
	});
});

describe('reportForm', () => {
	it('refuses a width that no page has, and says where', () => {
		const parsed = reportForm.safeParse({ ...reportValues(words), width: 'custom', widthMm: '400' });
		expect(parsed.error?.issues[0]).toMatchObject({ path: ['widthMm'], message: 'A figure is from 30 to 300 mm wide.' });
	});

	it('refuses a report without a title', () => {
		expect(reportForm.safeParse(reportValues({ ...words, title: ' ' })).error?.issues[0]?.path).toEqual(['title']);
	});
});
