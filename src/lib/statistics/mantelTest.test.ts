import { describe, expect, it } from 'vitest';
import { drawnOverlap } from './exampleTrees.ts';
import { mantelTest } from './mantelTest.ts';
import { symmetricMatrix } from './pairValues.ts';
import { randomStream } from './randomStream.ts';

describe('mantelTest', () => {
	// By property: a matrix without equal entries meets itself in the identity alone, among 5! = 120.
	it('finds a matrix like itself in one arrangement only', () => {
		const matrix = drawnOverlap(5, randomStream(2, 0, 8), 9);
		const { pearson, spearman, exact, count } = mantelTest(matrix, matrix, { permutations: 9, seed: 1 });
		expect({ exact, count }).toEqual({ exact: true, count: 120 });
		expect(pearson).toMatchObject({ greater: 1, less: 120, pGreater: 1 / 120 });
		expect(spearman).toMatchObject({ greater: 1, less: 120 });
		expect(pearson.statistic).toBeCloseTo(1, 14);
	});

	it('turns the tails over when the similarity becomes a distance', () => {
		const a = drawnOverlap(11, randomStream(3, 0, 8));
		const b = drawnOverlap(11, randomStream(4, 0, 8));
		const options = { permutations: 600, seed: 5 };
		const one = mantelTest(a, b, options).pearson;
		const other = mantelTest(
			a,
			b.map((value) => 1 - value),
			options
		).pearson;
		expect(other).toMatchObject({ less: one.greater, greater: one.less });
		expect(other.statistic).toBeCloseTo(-one.statistic, 12);
	});

	it('refuses matrices of different size, asymmetric ones and constant ones', () => {
		const a = drawnOverlap(4, randomStream(3, 0, 8));
		const options = { permutations: 9, seed: 5 };
		expect(() => mantelTest(a, drawnOverlap(5, randomStream(3, 0, 8)), options)).toThrow('A matrix of 4 species has 16 cells');
		const skewed = a.map((value, cell) => (cell === 1 ? value + 0.1 : value));
		expect(() => mantelTest(skewed, a, options)).toThrow('Expected a symmetric matrix');
		expect(() => mantelTest(a, symmetricMatrix(new Array(6).fill(0.5), 4, 1), options)).toThrow('Expected overlaps that differ');
		expect(() => mantelTest(Float64Array.of(0, 1, 1, 0), Float64Array.of(1, 0.5, 0.5, 1), options)).toThrow('at least 2 points');
	});
});
