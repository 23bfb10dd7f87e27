import { describe, expect, it } from 'vitest';
import { attachment, csvCell, csvLine, csvResponse } from './csv.ts';

describe('csvCell', () => {
	it('quotes what RFC 4180 asks to quote', () => {
		// by hand from RFC 4180, rules 6 and 7
		expect(csvCell('a,b')).toBe('"a,b"');
		expect(csvCell('say "wing"')).toBe('"say ""wing"""');
		expect(csvCell('two\nlines')).toBe('"two\nlines"');
		expect(csvCell('plain name')).toBe('plain name');
	});

	it('keeps a spreadsheet from running a name as a formula', () => {
		for (const sign of ['=', '+', '-', '@', '\t']) expect(csvCell(`${sign}cmd|x`)).toBe(`'${sign}cmd|x`);
		// a number is no formula
		expect(csvCell(-0.5)).toBe('-0.5');
	});

	it('writes numbers so that they read back as the same double', () => {
		for (const value of [0.1 + 0.2, 1 / 3, 5e-324, 1.7976931348623157e308, 12_345_678.9])
			expect(Number(csvCell(value))).toBe(value);
	});

	it('leaves a missing or undefined number empty', () => {
		expect(csvLine(['a', null, Number.NaN, 1])).toBe('a,,,1\r\n');
	});
});

describe('csvResponse', () => {
	it('sends every line of a table longer than one part', async () => {
		const lines = Array.from({ length: 30_000 }, (_, index) => csvLine([`species ${index}`, index]));
		const answer = csvResponse('pairs.csv', lines.values());
		expect(await answer.text()).toBe(lines.join(''));
		expect(answer.headers.get('content-type')).toContain('text/csv');
	});
});

describe('attachment', () => {
	it('gives a plain name and the full one', () => {
		expect(attachment('étude "1".csv')).toBe(`attachment; filename="-tude-1-.csv"; filename*=UTF-8''%C3%A9tude%20%221%22.csv`);
	});
});
