import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import type { MatrixOptions, MatrixReading } from './matrixReading.ts';
import { pairValue, type PairMatrix } from './pairMatrix.ts';
import { matrixFromBody, readMatrix } from './readMatrix.ts';

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

describe('settleMatrix', () => {
	const remarkOf = (text: string, options: Partial<MatrixOptions> = {}) => read(text, options).remarks[0];

	it('takes a zero diagonal for a distance, uses 1 − value and asks until the kind is confirmed', () => {
		const text = 'x,A,B,C\nA,0,.5,.75\nB,.5,0,.25\nC,.75,.25,0';
		const reading = read(text);
		expect(reading.kind).toBe('distance');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['settle similarity-or-distance']);
		expect(reading.remarks[0]?.message).toContain('reads as a distance; 1 − value will be used');
		expect(read(text, { confirm: { kind: 'distance' } }).remarks).toEqual([]);
	});

	it('keeps the values when a zero diagonal is confirmed to be a similarity', () => {
		const reading = read('x,A,B,C\nA,0,.5,.25\nB,.5,0,.75\nC,.25,.75,0', { confirm: { kind: 'similarity' } });
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['look diagonal-against-kind']);
	});

	it('assumes similarities where nothing tells, with a remark', () => {
		const reading = read('A\nB,.5\nC,.25,.75');
		expect(codes(reading)).toEqual(['look similarity-assumed']);
		expect(read('A\nB,.5\nC,.25,.75', { confirm: { kind: 'similarity' } }).remarks).toEqual([]);
	});

	it('believes the header of a pair list', () => {
		expect(codes(read('species_a,species_b,overlap\nA,B,.5\nA,C,.25\nB,C,.75'))).toEqual([]);
		const reading = read('species_a,species_b,distance\nA,B,.5\nA,C,.75\nB,C,.25');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['settle similarity-or-distance']);
	});

	it('takes values to 100 for per cent and asks until the scale is confirmed', () => {
		const text = 'x,A,B,C\nA,100,50,25\nB,50,100,75\nC,25,75,100';
		const reading = read(text);
		expect(reading.scale).toBe('percent');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['settle percent-or-fraction']);
		expect(read(text, { confirm: { scale: 'percent' } }).remarks).toEqual([]);
	});

	it('takes per cent distances for both', () => {
		const reading = read('x,A,B,C\nA,0,50,75\nB,50,0,25\nC,75,25,0');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['settle percent-or-fraction', 'settle similarity-or-distance']);
	});

	it('takes a half of zeros as not filled in and asks until the triangle is confirmed', () => {
		const text = 'x,A,B,C\nA,1,0,0\nB,.5,1,0\nC,.25,.75,1';
		const reading = read(text);
		expect(reading.shape).toBe('lower');
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(codes(reading)).toEqual(['settle zero-filled-half']);
		expect(read(text, { confirm: { triangle: 'lower' } }).remarks).toEqual([]);
		expect(pairValue(read(text, { confirm: { triangle: 'average' } }).matrix, 0, 1)).toBe(0.25);
		const upper = read('x,A,B,C\nA,1,.5,.25\nB,0,1,.75\nC,0,0,1');
		expect(rowsOf(upper.matrix)).toEqual(ABC);
		expect(upper.remarks[0]?.message).toContain('below the diagonal is 0');
	});

	it('averages halves that differ, names the worst pair with both values and asks', () => {
		const text = 'x,A,B,C\nA,1,.5,.2\nB,.6,1,.9\nC,.2,.3,1';
		const reading = read(text);
		expect(pairValue(reading.matrix, 1, 2)).toBeCloseTo(0.6, 14);
		expect(codes(reading)).toEqual(['settle asymmetric']);
		expect(reading.remarks[0]?.message).toContain('“B” and “C”: 0.9 one way and 0.3 the other');
		expect(reading.remarks[0]?.where).toEqual({ name: 'B', otherName: 'C' });
		for (const [triangle, expected] of [
			['upper', 0.9],
			['lower', 0.3],
			['average', 0.6]
		] as const) {
			const settled = read(text, { confirm: { triangle } });
			expect(pairValue(settled.matrix, 1, 2)).toBeCloseTo(expected, 14);
			expect(settled.remarks).toEqual([]);
		}
	});

	it('lets halves differ by rounding', () => {
		expect(read('x,A,B,C\nA,1,.5,.2\nB,.5000005,1,.3\nC,.2,.3,1').remarks).toEqual([]);
	});

	it('counts missing pairs and names the first', () => {
		const remark = remarkOf('x,A,B,C\nA,1,,.2\nB,,1,.3\nC,.2,.3,1');
		expect(remark).toMatchObject({ level: 'look', code: 'missing-pairs' });
		expect(remark?.message).toContain('1 pair is missing: “A” with “B”.');
		const many = remarkOf('species_a,species_b,overlap\nA,B,.1\nC,D,.2\nE,F,.3');
		expect(many?.message).toContain('12 pairs are missing: “A” with “C”, “A” with “D”, “A” with “E” and 9 more.');
	});

	it('says that a constant matrix and a single pair cannot be tested', () => {
		expect(remarkOf('A,B,.5\nA,C,.5\nB,C,.5', { confirm: { kind: 'similarity' } })).toMatchObject({
			level: 'settle',
			code: 'constant-overlap'
		});
		expect(remarkOf('x,A,B\nA,1,.5\nB,.5,1')).toMatchObject({ level: 'settle', code: 'single-pair' });
	});

	it('lets rank correlations be negative, and asks about negative values of an unnamed measure', () => {
		const text = 'x,A,B,C\nA,1,-.5,.2\nB,-.5,1,.3\nC,.2,.3,1';
		const reading = read(text, { measure: 'spearman-cells' });
		expect(pairValue(reading.matrix, 0, 1)).toBe(-0.5);
		expect(reading.remarks).toEqual([]);
		expect(codes(read(text, { measure: 'other' }))).toEqual(['settle negative-overlap']);
		expect(read(text, { measure: 'other', confirm: { kind: 'similarity' } }).remarks).toEqual([]);
		const distances = read('x,A,B,C\nA,0,1.5,.8\nB,1.5,0,.7\nC,.8,.7,0', { measure: 'spearman-cells' });
		expect(pairValue(distances.matrix, 0, 1)).toBe(-0.5);
	});
});

describe('matrixFromBody', () => {
	it('reads numbers as the same matrix in text', () => {
		const reading = matrixFromBody({ species: ['A', 'B', 'C'], values: ABC }, D);
		expect(rowsOf(reading.matrix)).toEqual(ABC);
		expect(reading).toMatchObject({
			shape: 'square',
			kind: 'similarity',
			scale: 'fraction',
			separator: null,
			decimal: null,
			remarks: []
		});
	});

	it('takes null for missing and asks the same questions', () => {
		const values = [
			[0, null, 30],
			[null, 0, 60],
			[30, 60, 0]
		];
		const reading = matrixFromBody({ species: ['A', 'B', 'C'], values }, D);
		expect(codes(reading)).toEqual(['settle percent-or-fraction', 'settle similarity-or-distance', 'look missing-pairs']);
		expect(pairValue(reading.matrix, 0, 2)).toBeCloseTo(0.7, 14);
	});

	it.each([
		['ragged-rows', { species: ['A', 'B'], values: [[1, 0.5]] }, 'Expected 2 rows of values'],
		['ragged-rows', { species: ['A', 'B'], values: [[1, 0.5], [1]] }, 'Row “B”: expected 2 values; got 1.'],
		[
			'not-a-number',
			{
				species: ['A', 'B'],
				values: [
					[1, NaN],
					[0.5, 1]
				]
			},
			'Row “A”, column “B”: NaN is not a number.'
		],
		[
			'out-of-range',
			{
				species: ['A', 'B'],
				values: [
					[1, 3],
					[3, 1]
				]
			},
			'Row “A”, column “B”: expected a value from 0 to 1; got 3.'
		],
		[
			'duplicate-species',
			{
				species: ['A', 'A'],
				values: [
					[1, 0.5],
					[0.5, 1]
				]
			},
			'position 1 of the species and in position 2'
		],
		['too-few-species', { species: [], values: [] }, 'got 0']
	])('refuses %s', (code, body, message) => {
		const error = refusal(() => matrixFromBody(body, D));
		expect(error.code).toBe(code);
		expect(error.message).toContain(message);
	});
});
