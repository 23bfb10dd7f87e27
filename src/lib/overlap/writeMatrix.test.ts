import { describe, expect, it } from 'vitest';
import { readMatrix } from './readMatrix.ts';
import { writeMatrixCsv, writePairList } from './writeMatrix.ts';

const matrix = { species: ['=SUM(A1)', 'B, "b"', '-c'], values: Float64Array.of(1, 0.1, NaN, 0.1, 1, 1 / 3, NaN, 1 / 3, 1) };

describe('writeMatrixCsv', () => {
	it('writes a square, quotes by RFC 4180 and stops formulas with an apostrophe', () => {
		expect(writeMatrixCsv(matrix)).toBe(
			`species,'=SUM(A1),"B, ""b""",'-c\n'=SUM(A1),1,0.1,\n"B, ""b""",0.1,1,0.3333333333333333\n'-c,,0.3333333333333333,1\n`
		);
	});

	it('is read back to the same matrix, names included', () => {
		expect(readMatrix(writeMatrixCsv(matrix), { measure: 'schoener-d' }).matrix).toEqual(matrix);
	});
});

describe('writePairList', () => {
	it('writes each pair once and keeps the row of a missing one', () => {
		expect(writePairList(matrix)).toBe(
			`species_a,species_b,overlap\n'=SUM(A1),"B, ""b""",0.1\n'=SUM(A1),'-c,\n"B, ""b""",'-c,0.3333333333333333\n`
		);
		expect(readMatrix(writePairList(matrix), { measure: 'schoener-d' }).matrix).toEqual(matrix);
	});
});
