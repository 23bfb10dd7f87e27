import { describe, expect, it } from 'vitest';
import { identityArrangement, nextArrangementInPlace } from './arrangements.ts';
import { drawnOverlap } from './exampleTrees.ts';
import { mantelMoments } from './mantelMoments.ts';
import { symmetricMatrix } from './pairValues.ts';
import { randomStream } from './randomStream.ts';

/** The same moments from all n! values of z: the definition. */
function enumeratedMoments(a: Float64Array, b: Float64Array, n: number) {
	const arrangement = identityArrangement(n);
	const all: number[] = [];
	do {
		let z = 0;
		for (let i = 1; i < n; i++) {
			for (let j = 0; j < i; j++) z += (a[i * n + j] ?? 0) * (b[(arrangement[i] ?? 0) * n + (arrangement[j] ?? 0)] ?? 0);
		}
		all.push(z);
	} while (nextArrangementInPlace(arrangement, [{ from: 0, to: n }]));
	const mean = all.reduce((sum, z) => sum + z, 0) / all.length;
	const central = (power: number) => all.reduce((sum, z) => sum + (z - mean) ** power, 0) / all.length;
	return { mean, variance: central(2), skewness: central(3) / central(2) ** 1.5 };
}

describe('mantelMoments', () => {
	// By property: the closed form is the average over all arrangements. From 4 rows on patterns with up to 6 rows appear
	// one after another; 7 has them all.
	it.each([4, 5, 6, 7])('agrees with the enumeration of all arrangements of %i rows', (n) => {
		for (let seed = 0; seed < 5; seed++) {
			const a = drawnOverlap(n, randomStream(seed, n, 8), 6);
			const b = drawnOverlap(n, randomStream(seed, n, 9), 6);
			const expected = enumeratedMoments(a, b, n);
			const moments = mantelMoments(a, b);
			expect(moments.mean).toBeCloseTo(expected.mean, 11);
			expect(moments.variance).toBeCloseTo(expected.variance, 11);
			expect(moments.skewness).toBeCloseTo(expected.skewness, 8);
		}
	});

	it('moves only the mean when a constant is added to one matrix', () => {
		const a = drawnOverlap(9, randomStream(1, 0, 8), 6);
		const b = drawnOverlap(9, randomStream(2, 0, 8), 6);
		const moved = mantelMoments(
			a.map((value) => value + 100),
			b
		);
		const { variance, skewness } = mantelMoments(a, b);
		expect(moved.variance).toBeCloseTo(variance, 10);
		expect(moved.skewness).toBeCloseTo(skewness ?? Number.NaN, 9);
	});

	it('has no skewness where every arrangement gives the same z', () => {
		const flat = symmetricMatrix(new Array(10).fill(0.3), 5, 1);
		expect(mantelMoments(flat, drawnOverlap(5, randomStream(1, 1, 8)))).toMatchObject({ variance: 0, skewness: null });
	});
});
