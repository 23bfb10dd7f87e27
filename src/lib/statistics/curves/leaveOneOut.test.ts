import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawnOverlap, drawnTree, exampleTree, pairAgeMatrix } from '../exampleTrees.ts';
import { linearRegression } from '../linearRegression.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { randomStream } from '../randomStream.ts';
import { leaveOneOutSlopes } from './leaveOneOut.ts';

describe('leaveOneOutSlopes', () => {
	it('gives the four slopes of the worked example', () => {
		const ages = pairAgeMatrix(exampleTree('(((A:1,B:1):1,C:2):2,D:4);'));
		const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		// Worked example of the methods, exact fractions: leaving out A, B, C, D.
		const expected = [-0.075, -0.125, -0.133333333333, -0.15];
		for (const [i, slope] of leaveOneOutSlopes(ages, overlap, 4).entries()) expect(slope).toBeCloseTo(expected[i] ?? 0, 11);
	});

	it('agrees with a regression without the species, the slow way', () => {
		fc.assert(
			fc.property(fc.integer({ min: 5, max: 25 }), fc.nat(10_000), (count, seed) => {
				const ages = pairAgeMatrix(drawnTree(count, randomStream(seed, 0), { polytomies: true }));
				const overlap = drawnOverlap(count, randomStream(seed, 1), 6);
				const slopes = leaveOneOutSlopes(ages, overlap, count);
				for (let out = 0; out < count; out++) {
					const x: number[] = [];
					const y: number[] = [];
					for (let i = 0; i < count; i++) {
						for (let j = 0; j < i; j++) {
							if (i === out || j === out) continue;
							x.push(ages[i * count + j] ?? 0);
							y.push(overlap[i * count + j] ?? 0);
						}
					}
					if (new Set(x).size < 2) expect(slopes[out]).toBeNull();
					else expect(slopes[out]).toBeCloseTo(linearRegression(x, y).slope, 9);
				}
			}),
			{ numRuns: 40 }
		);
	});

	it('is null where the pairs that remain are of one age', () => {
		// Without D, A, B and C part at once: all pairs 1 old.
		const ages = pairAgeMatrix(exampleTree('((A:1,B:1,C:1):2,D:3);'));
		const slopes = leaveOneOutSlopes(ages, drawnOverlap(4, randomStream(1, 1)), 4);
		expect(slopes.map((slope) => slope === null)).toEqual([false, false, false, true]);
	});

	it('refuses what is not a number', () => {
		const ages = pairAgeMatrix(exampleTree('(((A:1,B:1):1,C:2):2,D:4);'));
		expect(() => leaveOneOutSlopes(ages, symmetricMatrix([1, 1, 1, 1, 1, Number.NaN], 4, 1), 4)).toThrow('rows 4 and 3');
	});
});
