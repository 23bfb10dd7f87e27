import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import type { MatrixOptions, MatrixReading } from './matrixReading.ts';
import { pairValue, selectSpecies, type PairMatrix } from './pairMatrix.ts';
import { readMatrix } from './readMatrix.ts';
import { writeMatrixCsv, writePairList } from './writeMatrix.ts';

// Expected values in this file are written by hand beside the text they are read from.
const D: MatrixOptions = { measure: 'schoener-d' };

function read(text: string | Uint8Array, options: Partial<MatrixOptions> = {}): MatrixReading {
	return readMatrix(text, { ...D, ...options });
}

function codes(reading: MatrixReading): string[] {
	return reading.remarks.map(({ level, code }) => `${level} ${code}`);
}

function refusal(run: () => unknown): InputError {
	try {
		run();
	} catch (error) {
		if (error instanceof InputError) return error;
		throw error;
	}
	throw new Error('Expected an InputError; nothing was thrown.');
}

function rowsOf({ species, values }: PairMatrix): number[][] {
	return species.map((_, i) => [...values.slice(i * species.length, (i + 1) * species.length)]);
}

const ABC = [
	[1, 0.5, 0.25],
	[0.5, 1, 0.75],
	[0.25, 0.75, 1]
];

describe('readMatrix, shapes', () => {
	it.each([
		['a square', 'x,A,B,C\nA,1,.5,.25\nB,.5,1,.75\nC,.25,.75,1', 'square'],
		['a square with an empty corner', ',A,B,C\nA,1,.5,.25\nB,.5,1,.75\nC,.25,.75,1', 'square'],
		['a square whose header has no corner', 'A,B,C\nA,1,.5,.25\nB,.5,1,.75\nC,.25,.75,1', 'square'],
		['a square named only in the first column', 'A,1,.5,.25\nB,.5,1,.75\nC,.25,.75,1', 'square'],
		['columns in another order than rows', 'x,C,A,B\nA,.25,1,.5\nB,.75,.5,1\nC,1,.25,.75', 'square'],
		['a lower half with blanks', 'x,A,B,C\nA,1,,\nB,.5,1,\nC,.25,.75,1', 'lower'],
		['a lower half with NA', 'x,A,B,C\nA,1,NA,NA\nB,.5,1,NA\nC,.25,.75,1', 'lower'],
		['a lower half that ends at its diagonal', 'x,A,B,C\nA,1\nB,.5,1\nC,.25,.75,1', 'lower'],
		['a lower half without diagonal', 'x,A,B,C\nA,,,\nB,.5,,\nC,.25,.75,', 'lower'],
		['a ragged lower half without diagonal or header', 'A\nB,.5\nC,.25,.75', 'lower'],
		['a lower half without first row and last column', 'x,A,B\nB,.5,\nC,.25,.75', 'lower'],
		['an upper half', 'x,A,B,C\nA,1,.5,.25\nB,,1,.75\nC,,,1', 'upper'],
		['an upper half without diagonal', 'x,A,B,C\nA,,.5,.25\nB,,,.75\nC,,,', 'upper'],
		['an upper half without first column and last row', 'x,B,C\nA,.5,.25\nB,,.75', 'upper'],
		['a list of pairs', 'species_a,species_b,overlap\nA,B,.5\nA,C,.25\nB,C,.75', 'pairs'],
		['a list of pairs without header', 'A,B,.5\nA,C,.25\nB,C,.75', 'pairs'],
		['a list of pairs with any header', 'one,two,dd\nA,B,.5\nC,A,.25\nB,C,.75', 'pairs'],
		['a list with every pair twice', 'A,B,.5\nB,A,.5\nA,C,.25\nC,A,.25\nB,C,.75\nC,B,.75', 'pairs']
	])('reads %s', (_, text, shape) => {
		const reading = read(text);
		expect(reading.shape).toBe(shape);
		expect(reading.matrix.species).toEqual(['A', 'B', 'C']);
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(reading.remarks.filter(({ level }) => level === 'settle')).toEqual([]);
	});

	it('reads a square named only in its first row, and says so', () => {
		const reading = read('A,B,C\n1,.5,.25\n.5,1,.75\n.25,.75,1');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['look names-from-header']);
	});

	it('takes row names 1, 2, 3 as numbering when the columns are named', () => {
		const reading = read('"","A","B","C"\n"1",1,.5,.25\n"2",.5,1,.75\n"3",.25,.75,1');
		expect(reading.matrix.species).toEqual(['A', 'B', 'C']);
		expect(rowsOf(reading.matrix)).toEqual(ABC);
	});

	it('reads species that are numbers', () => {
		expect(read('x,18,15,24\n18,1,.5,.25\n15,.5,1,.75\n24,.25,.75,1').matrix.species).toEqual(['18', '15', '24']);
	});

	it('pairs columns that a statistical program respelled with the rows they name', () => {
		const reading = read('x,Parus.major,Parus.ater\nParus major,1,.5\nParus ater,.5,1');
		expect(reading.matrix.species).toEqual(['Parus major', 'Parus ater']);
		expect(codes(reading)).toContain('information names-aligned');
	});

	it('reads the overlap from the column of that name and says that others were left aside', () => {
		const reading = read('species_a,species_b,age,overlap\nA,B,12,.5\nA,C,30,.25\nB,C,30,.75');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['look other-columns']);
		expect(reading.remarks[0]?.message).toContain('column 4 (“overlap”)');
	});
});

describe('readMatrix, text', () => {
	it.each([
		['commas', 'x,A,B,C\nA,1,0.5,0.25\nB,0.5,1,0.75\nC,0.25,0.75,1', ',', '.'],
		['semicolons', 'x;A;B;C\nA;1;0.5;0.25\nB;0.5;1;0.75\nC;0.25;0.75;1', ';', '.'],
		['semicolons and decimal commas', 'x;A;B;C\nA;1;0,5;0,25\nB;0,5;1;0,75\nC;0,25;0,75;1', ';', ','],
		['tabs', 'x\tA\tB\tC\nA\t1\t0.5\t0.25\nB\t0.5\t1\t0.75\nC\t0.25\t0.75\t1', '\t', '.'],
		['tabs and decimal commas', 'x\tA\tB\tC\nA\t1\t0,5\t0,25\nB\t0,5\t1\t0,75\nC\t0,25\t0,75\t1', '\t', ','],
		['CRLF', 'x,A,B,C\r\nA,1,.5,.25\r\nB,.5,1,.75\r\nC,.25,.75,1\r\n', ',', '.'],
		['CR alone', 'x,A,B,C\rA,1,.5,.25\rB,.5,1,.75\rC,.25,.75,1\r', ',', '.'],
		['a byte order mark and blank lines', '\uFEFFx,A,B,C\n\nA,1,.5,.25\nB,.5,1,.75\n\nC,.25,.75,1\n\n', ',', '.'],
		['empty columns at the right', 'x,A,B,C,,\nA,1,.5,.25,,\nB,.5,1,.75,,\nC,.25,.75,1,,', ',', '.']
	])('reads %s', (_, text, separator, decimal) => {
		const reading = read(text);
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect([reading.separator, reading.decimal]).toEqual([separator, decimal]);
		expect(reading.remarks).toEqual([]);
	});

	it('reads quoted cells with separators, quotation marks and line ends inside', () => {
		const reading = read('x,"A, b","say ""C"""\n"A, b",1,"0.5"\n"say ""C""",0.5,1\n');
		expect(reading.matrix.species).toEqual(['A, b', 'say "C"']);
		expect(pairValue(reading.matrix, 0, 1)).toBe(0.5);
	});

	it('counts the lines inside quoted cells when it names a place', () => {
		const run = () => read('"x\ny",A,B,C\nA,1,.5,.2\nB,.5,1,oak\nC,.2,.3,1');
		expect(refusal(run).where).toMatchObject({ line: 4, column: 4 });
	});

	const text = 'x\tÅ\tB\tC\nÅ\t1\t0,5\t0,25\nB\t0,5\t1\t0,75\nC\t0,25\t0,75\t1';
	const bytesOf = (code: number, order: 'le' | 'be') => (order === 'le' ? [code & 255, code >> 8] : [code >> 8, code & 255]);
	const utf16 = (order: 'le' | 'be') =>
		Uint8Array.from([...`\uFEFF${text}`].flatMap((sign) => bytesOf(sign.charCodeAt(0), order)));

	it.each([
		['UTF-8', new TextEncoder().encode(text)],
		['UTF-16, low byte first', utf16('le')],
		['UTF-16, high byte first', utf16('be')],
		['UTF-16 without a mark', utf16('le').slice(2)],
		['UTF-16, high byte first, without a mark', utf16('be').slice(2)]
	])('reads %s', (_, bytes) => {
		const reading = read(bytes);
		expect(reading.matrix.species).toEqual(['Å', 'B', 'C']);
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(reading.remarks).toEqual([]);
	});

	it('reads bytes that are not UTF-8 as Windows-1252 and says so', () => {
		const reading = read(Uint8Array.from([...text], (sign) => sign.charCodeAt(0)));
		expect(reading.matrix.species[0]).toBe('Å');
		expect(codes(reading)).toEqual(['look not-utf-8']);
	});
});

describe('readMatrix and the writers, for any matrix', () => {
	const name = fc.stringMatching(/^[=+@A-Za-z][A-Za-z ,;"'.]{0,8}[a-z]$/);
	const matrices = fc
		.uniqueArray(name, { minLength: 3, maxLength: 7 })
		.chain((species) =>
			fc.record({
				species: fc.constant(species),
				pairs: fc.uniqueArray(
					fc.integer({ min: 1, max: 9999 }).map((value) => value / 10_000),
					{ minLength: 21, maxLength: 21 }
				),
				order: fc.shuffledSubarray([...species.keys()], { minLength: species.length }),
				otherOrder: fc.shuffledSubarray([...species.keys()], { minLength: species.length })
			})
		)
		.map(({ species, pairs, order, otherOrder }) => {
			const values = new Float64Array(species.length ** 2).fill(1);
			let next = 0;
			for (let i = 0; i < species.length; i++) {
				for (let j = 0; j < i; j++) {
					values[i * species.length + j] = values[j * species.length + i] = pairs[next++] ?? 0;
				}
			}
			return { matrix: { species, values }, order, otherOrder };
		});
	const cell = (text: string) => `"${text.replaceAll('"', '""')}"`;
	const table = ({ species, values }: PairMatrix, rows: number[], columns: number[], keeps = (_i: number, _j: number) => true) =>
		[
			['x', ...columns.map((j) => cell(species[j] ?? ''))].join(','),
			...rows.map((i) =>
				[cell(species[i] ?? ''), ...columns.map((j) => (keeps(i, j) ? String(values[i * species.length + j]) : ''))].join(',')
			)
		].join('\n');

	it('changes nothing when rows and columns of the file are permuted', () => {
		fc.assert(
			fc.property(matrices, ({ matrix, order, otherOrder }) => {
				const reading = read(table(matrix, order, otherOrder));
				expect(reading.remarks).toEqual([]);
				expect(selectSpecies(reading.matrix, matrix.species)).toEqual(matrix);
			})
		);
	});

	it('reads lower half, upper half, square and pair list of a matrix alike', () => {
		fc.assert(
			fc.property(matrices, ({ matrix }) => {
				const all = [...matrix.species.keys()];
				const texts = [
					table(matrix, all, all),
					table(matrix, all, all, (i, j) => i >= j),
					table(matrix, all, all, (i, j) => i > j),
					table(matrix, all, all, (i, j) => i <= j),
					table(matrix, all, all, (i, j) => i < j),
					writePairList(matrix),
					writeMatrixCsv(matrix)
				];
				const readings = texts.map((text) => read(text));
				expect(readings.map(({ shape }) => shape)).toEqual(['square', 'lower', 'lower', 'upper', 'upper', 'pairs', 'square']);
				for (const reading of readings) expect(reading.matrix).toEqual(matrix);
			})
		);
	});
});
