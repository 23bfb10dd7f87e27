import { describe, expect, it } from 'vitest';
import { plateQuerySchema } from '#lib/contracts/answers.ts';
import { figureSettingsSchema } from '#lib/contracts/report.ts';
import { figureQuery } from './figureQuery.ts';

describe('figureQuery', () => {
	// By property: the plate’s own schema reads back every setting that was written.
	it('writes what the address of a plate reads', () => {
		const figure = figureSettingsSchema.parse({ widthMm: 129, age: 'right', palette: 'cividis', typeSizePt: 8 });
		const read = plateQuerySchema.parse(Object.fromEntries(new URLSearchParams(figureQuery(figure))));
		expect(read).toEqual({ width: 129, age: 'right', palette: 'cividis', type: 8 });
	});
});
