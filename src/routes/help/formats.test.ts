import { describe, expect, it } from 'vitest';
import { readMatrix } from '#lib/overlap/readMatrix.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { MATRIX_FORMATS, TREE_FORMATS } from './formats.ts';

/** Pairs in alphabetical order of their names, so that the three forms can be compared. */
function pairsOf(sample: string): [string, number][] {
	const { matrix } = readMatrix(sample, { measure: 'schoener-d' });
	const n = matrix.species.length;
	return matrix.species.flatMap((a, i) =>
		matrix.species
			.map((b, j): [string, number] => [`${a} × ${b}`, matrix.values[i * n + j] ?? Number.NaN])
			.filter((_, j) => a < (matrix.species[j] ?? ''))
	);
}

describe('the samples of the help page', () => {
	// By hand, from the samples: one tree in the first, two in the second, four tips each.
	it('holds trees that the program reads', () => {
		expect(TREE_FORMATS.map(({ sample }) => readTrees(sample).trees.length)).toEqual([1, 2]);
	});

	it('writes the same matrix in each form', () => {
		const [square, half, list] = MATRIX_FORMATS.map(({ sample }) => new Map(pairsOf(sample)));
		// By hand: arida and tumida have 0.71, and four species make six pairs.
		expect(square?.get('L. arida × L. tumida')).toBe(0.71);
		expect(square?.size).toBe(6);
		expect(half).toEqual(square);
		expect(list).toEqual(square);
	});

	it('needs no answer to be read', () => {
		for (const { sample } of MATRIX_FORMATS) {
			const { remarks } = readMatrix(sample, { measure: 'schoener-d' });
			expect(remarks.filter(({ level }) => level === 'settle')).toEqual([]);
		}
	});
});
