import { describe, expect, it } from 'vitest';
import { readNicheTable } from './readNicheTable.ts';

const text = 'species,temperature,temperature_se,n records,thermal breadth\nA,10.5,0.2,31,4\nB,12,0.3,8,NA\nC,-3,0.1,120,2.5\n';

describe('readNicheTable', () => {
	it('reads variables, their standard errors and what columns tell', () => {
		const table = readNicheTable(text);
		expect(table.species).toEqual(['A', 'B', 'C']);
		expect(table.variables.map(({ name, role }) => [name, role])).toEqual([
			['temperature', 'position'],
			['n records', 'records'],
			['thermal breadth', 'breadth']
		]);
		expect([...(table.variables[0]?.standardErrors ?? [])]).toEqual([0.2, 0.3, 0.1]);
		expect(table.variables[2]?.values[1]).toBeNaN();
		expect(table.remarks.map(({ code }) => code)).toEqual(['column-role', 'column-role', 'missing-values']);
		expect(table.remarks[2]?.message).toContain('“thermal breadth” has no value for B');
	});

	it('takes decimal commas where they do not separate cells', () => {
		expect([...(readNicheTable('sp;x\nA;1,5\nB;2,25\n').variables[0]?.values ?? [])]).toEqual([1.5, 2.25]);
	});

	it('lets a person overrule what a column tells', () => {
		const table = readNicheTable(text, { 'thermal breadth': 'position' });
		expect(table.variables[2]?.role).toBe('position');
		expect(table.remarks.filter(({ code }) => code === 'column-role')).toHaveLength(1);
		expect(() => readNicheTable(text, { depth: 'breadth' })).toThrow('The table has no column “depth”.');
	});

	it.each([
		['a single row', 'species,x\n', 'the table has a single row'],
		['names only', 'species,\nA,\nB,\n', 'the table has names only'],
		['no names of columns', '1,2\n3,4\n', 'it holds numbers only'],
		['a column without a name', 'species,x,\nA,1,2\n', 'Column 3 has values and no name'],
		['a column twice', 'species,x,x\nA,1,2\n', 'Two columns are named “x”'],
		['a row without a species', 'species,x\n,2\n', 'Line 2 has values and no species name'],
		['a species twice', 'species,x\nA,1\nA,2\n', '“A” stands on line 2 and again on line 3'],
		['a word among numbers', 'species,x\nA,warm\n', 'Line 2, column “x”: “warm” is not a number'],
		['a negative error', 'species,x,x_se\nA,1,-0.1\n', 'A standard error in “x_se” is below 0: -0.1']
	])('refuses %s', (_, given, sentence) => {
		expect(() => readNicheTable(given)).toThrow(sentence);
	});
});
