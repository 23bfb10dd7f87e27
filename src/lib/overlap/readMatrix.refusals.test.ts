import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import type { MatrixOptions } from './matrixReading.ts';
import { readMatrix } from './readMatrix.ts';

// Expected values in this file are written by hand beside the text they are read from.
const D: MatrixOptions = { measure: 'schoener-d' };

function refusal(run: () => unknown): InputError {
	try {
		run();
	} catch (error) {
		if (error instanceof InputError) return error;
		throw error;
	}
	throw new Error('Expected an InputError; nothing was thrown.');
}

describe('readMatrix, refusals', () => {
	it.each([
		['empty', '  \n ', 'Expected a matrix or a list of pairs; the text is empty.'],
		['empty', 'x,A,B\nA,1,NA\nB,NA,1', 'every pair is missing'],
		['spreadsheet-file', 'PK\u0003\u0004rest', 'save the one sheet with the matrix as CSV'],
		['not-text', 'A,B\0,C', 'this file holds binary data'],
		['no-separator', 'A 1 0.5\nB 0.5 1', 'the text has none of them'],
		['not-a-matrix', '((A:1,B:1):1,C:2);', 'reads as a tree'],
		['not-a-matrix', '#NEXUS\nbegin trees, x;', 'reads as a tree'],
		['open-quote', 'x,"A,B\nA,1,.5', 'Line 1, column 2: expected the quotation mark to be closed'],
		['stray-quote', 'x,"A"z,B\nA,1,.5', 'Line 1, column 2: expected a separator after “A”'],
		['duplicate-species', 'x,A,B,A\nA,1,.5,.2\nB,.5,1,.3\nA,.2,.3,1', '“A” stands in line 2 and in line 4'],
		['duplicate-species', 'x,A,B,A\nA,1,.5,.2\nB,.5,1,.3\nC,.2,.3,1', '“A” stands in column 2 and in column 4'],
		['unnamed-species', 'x,A,B,C\nA,1,.5,.2\n,.5,1,.3\nC,.2,.3,1', 'line 3 has none'],
		['unnamed-species', 'A,B,.5\nA,,.3\nB,C,.2\nA,C,.1', 'Line 2, column 2: expected a species name'],
		[
			'names-differ',
			'x,s1,s2,s3\nA,1,.5,.2\nB,.5,1,.3\nC,.4,.2,.1',
			'they share none (rows “A”, “B” and “C”; columns “s1”, “s2” and “s3”)'
		],
		['names-differ', 'x,A,B,C\nA,1,.5,.2\nB,.5,1,.3\nK,.2,.3,1', '“K” is only a row, “C” is only a column'],
		['names-differ', 'x,A,B\nA,1,.5\nB,.5,1\nC,.2,.3\nE,.4,.2', '“C” is only a row, “E” is only a row'],
		['ragged-rows', 'x,A,B,C\nA,1,.5,.2\nB,.5,1\nC,.2,.3,1', 'Line 3: expected 3 values, as the header names 3 species; got 2.'],
		['ragged-rows', 'x,A,B,C\nA,1,0,5,0,2\nB,0,5,1,0,3\nC,0,2,0,3,1', 'got 5. If the numbers have decimal commas'],
		['ragged-rows', 'A,1,.5,.2\nB,.5,1,.3', 'as there are 2 rows; got 3'],
		[
			'not-a-number',
			'x,A,B,C\nA,1,.5,.2\nB,.5,1,"0,82"\nC,.2,.3,1',
			'Line 3, column 4: “0,82” is not a number. With decimal commas,'
		],
		['not-a-number', 'x;A;B;C\nA;1;0.5;0.2\nB;0.5;1;0,8\nC;0.2;0.8;1', 'Other cells have decimal points'],
		['not-a-number', 'x;A;B;C\nA;1;0,5;0,2\nB;0,5;1;0.8\nC;0,2;0,8;1', 'Other cells have decimal commas'],
		['not-a-number', 'x,A,B,C\nA,1,50%,.2\nB,.5,1,.8\nC,.2,50%,1', 'without the sign. It is the first of 2 such cells.'],
		[
			'not-a-number',
			'x,A,B,C\nA,1,Inf,.2\nB,.5,1,.8\nC,.2,.8,1',
			'“Inf” is not a number. Leave a missing value blank or write NA.'
		],
		[
			'not-a-number',
			'name,diet,habit\nA,fruit,tree\nB,seed,soil',
			'Expected numbers between species; no cell is one (the first, line 2, column 2, reads “fruit”)'
		],
		[
			'mixed-diagonal',
			'x,A,B,C\nA,1,.5,.2\nB,.5,0,.3\nC,.2,.3,1',
			'Line 3, column 3: expected every species to have 1 with itself'
		],
		['mixed-diagonal', 'x,A,B\nA,.9,.5\nB,.5,.9', '“A” has 0.9.'],
		[
			'out-of-range',
			'x,A,B,C\nA,1,.5,1.3\nB,.5,1,.3\nC,1.3,.3,1',
			'Line 2, column 4: expected a value from 0 to 1; got 1.3. It is the first of 2 such cells.'
		],
		['out-of-range', 'x,A,B,C\nA,1,-.5,.3\nB,-.5,1,.3\nC,.3,.3,1', 'Only rank correlations over cells may be negative.'],
		['out-of-range', 'x,A,B,C\nA,100,50,130\nB,50,100,3\nC,130,3,100', 'expected a value from 0 to 100; got 130'],
		[
			'pair-twice',
			'A,B,.5\nA,C,.2\nB,C,.3\nA,B,.6',
			'Line 4, column 3: expected each pair once; “A” and “B” had 0.5 before and have 0.6 here.'
		],
		['too-few-species', 'species_a,species_b,overlap\nA,A,1', 'Expected at least 2 species; got 1.']
	])('refuses %s: %j', (code, text, message) => {
		const error = refusal(() => readMatrix(text, D));
		expect(error.message).toContain(message);
		expect(error.code).toBe(code);
	});

	it('refuses a workbook given as bytes', () => {
		for (const magic of [
			[0x50, 0x4b, 3, 4],
			[0xd0, 0xcf, 0x11, 0xe0]
		]) {
			expect(refusal(() => readMatrix(Uint8Array.from([...magic, 9, 9]), D)).code).toBe('spreadsheet-file');
		}
	});

	it('refuses more than 2,000 species in any shape', () => {
		const lower = Array.from({ length: 2001 }, (_, i) => `S${i},0.5`).join('\n');
		const pairs = Array.from({ length: 2000 }, (_, i) => `A,S${i},0.5`).join('\n');
		for (const text of [lower, pairs]) {
			const error = refusal(() => readMatrix(text, D));
			expect(error.code).toBe('too-many-species');
			expect(error.message).toContain('at most 2,000 species; this matrix has 2,001');
		}
	});
});
