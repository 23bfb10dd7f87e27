import { describe, expect, it } from 'vitest';
import { covariateFromBody, readCovariate } from './readCovariate.ts';

const SQUARE = ['species,Alpha,Beta,Gamma', 'Alpha,0,142.5,9', 'Beta,142.5,0,220', 'Gamma,9,220,0'].join('\n');

describe('readCovariate', () => {
	it('keeps values above 1 as they stand', () => {
		const { matrix, kind, remarks } = readCovariate(SQUARE);
		expect(matrix.species).toEqual(['Alpha', 'Beta', 'Gamma']);
		expect([...matrix.values]).toEqual([NaN, 142.5, 9, 142.5, NaN, 220, 9, 220, NaN]);
		expect(kind).toBe('distance');
		expect(remarks).toEqual([]);
	});

	it('reads a half and a list of pairs as the square', () => {
		const half = readCovariate('species,Alpha,Beta,Gamma\nAlpha\nBeta,142.5\nGamma,9,220');
		const list = readCovariate('species_a,species_b,distance\nAlpha,Beta,142.5\nAlpha,Gamma,9\nBeta,Gamma,220');
		expect(half.matrix).toEqual(readCovariate(SQUARE).matrix);
		expect(list.matrix).toEqual(readCovariate(SQUARE).matrix);
	});

	it('takes a diagonal that is not 0 for similarities, unless told otherwise', () => {
		const shared = 'species,Alpha,Beta,Gamma\nAlpha,12,3,0\nBeta,3,8,1\nGamma,0,1,20';
		expect(readCovariate(shared).kind).toBe('similarity');
		expect(readCovariate(shared, { kind: 'distance' }).kind).toBe('distance');
	});

	it('asks which half to take when they differ, and takes the one confirmed', () => {
		const uneven = SQUARE.replace('Beta,142.5', 'Beta,150');
		expect(readCovariate(uneven).remarks.map(({ level, code }) => [level, code])).toEqual([['settle', 'asymmetric']]);
		const lower = readCovariate(uneven, { triangle: 'lower' });
		expect(lower.matrix.values[1]).toBe(150);
		expect(lower.remarks).toEqual([]);
	});

	it('tells of missing pairs in the words that overlaps have', () => {
		const [remark] = readCovariate(SQUARE.replaceAll('142.5', '')).remarks;
		expect(remark).toMatchObject({ level: 'look', code: 'missing-pairs' });
		expect(remark?.message).toBe(
			'1 pair is missing: “Alpha” with “Beta”. A test needs every pair: leave species out or fill them in.'
		);
	});

	it('asks for another matrix when every pair has one value', () => {
		const { remarks } = readCovariate('species,Alpha,Beta,Gamma\nAlpha\nBeta,4\nGamma,4,4');
		expect(remarks[0]).toMatchObject({ level: 'settle', code: 'constant-covariate' });
		expect(remarks[0]?.message).toContain('Every pair has the value 4');
	});

	it('names the cell of the first negative value', () => {
		expect(() => readCovariate(SQUARE.replaceAll('220', '-220'))).toThrow(
			'Line 3, column 4: expected a covariate of 0 or more; got -220. It is the first of 2 such cells.'
		);
	});

	it('refuses a matrix without a single value', () => {
		expect(() => readCovariate('species,Alpha,Beta\nAlpha,0,NA\nBeta,NA,0')).toThrow('every pair is missing');
	});
});

describe('covariateFromBody', () => {
	it('reads numbers as the text of the same matrix', () => {
		const values = [
			[0, 142.5, 9],
			[142.5, 0, null],
			[9, 220, 0]
		];
		const read = covariateFromBody({ species: ['Alpha', 'Beta', 'Gamma'], values });
		expect(read.matrix).toEqual(readCovariate(SQUARE).matrix);
		expect(read.separator).toBeNull();
	});

	it('refuses rows of different lengths', () => {
		expect(() => covariateFromBody({ species: ['Alpha', 'Beta'], values: [[0, 1], [1]] })).toThrow('expected 2 values; got 1');
	});
});
