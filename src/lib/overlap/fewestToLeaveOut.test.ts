import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fewestToLeaveOut } from './fewestToLeaveOut.ts';
import type { PairMatrix } from './pairMatrix.ts';

function withMissing(n: number, missing: readonly (readonly [number, number])[]): PairMatrix {
	const values = new Float64Array(n * n).fill(0.5);
	for (const [i, j] of missing) {
		values[i * n + j] = Number.NaN;
		values[j * n + i] = Number.NaN;
	}
	return { species: Array.from({ length: n }, (_, i) => `S${i}`), values };
}

describe('fewestToLeaveOut', () => {
	it('leaves nobody out of a complete matrix', () => {
		expect(fewestToLeaveOut(withMissing(5, []))).toEqual({ species: [], exact: true });
	});

	// By hand: S2 is in every missing pair.
	it('leaves out the one species that all missing pairs share', () => {
		expect(
			fewestToLeaveOut(
				withMissing(5, [
					[0, 2],
					[2, 3],
					[2, 4]
				])
			)
		).toEqual({ species: ['S2'], exact: true });
	});

	// By hand: a triangle needs two of its three, a ring of five needs three.
	it('finds the fewest where every species has two missing pairs', () => {
		expect(
			fewestToLeaveOut(
				withMissing(3, [
					[0, 1],
					[1, 2],
					[0, 2]
				])
			).species
		).toHaveLength(2);
		expect(
			fewestToLeaveOut(
				withMissing(5, [
					[0, 1],
					[1, 2],
					[2, 3],
					[3, 4],
					[0, 4]
				])
			).species
		).toHaveLength(3);
	});

	const graphs = fc.integer({ min: 2, max: 9 }).chain((n) => {
		const all = Array.from({ length: n }, (_, i) => Array.from({ length: i }, (__, j) => [j, i] as const)).flat();
		return fc.tuple(fc.constant(n), fc.subarray(all));
	});

	it('is as small as the best of all subsets, and leaves no pair missing', () => {
		fc.assert(
			fc.property(graphs, ([n, missing]) => {
				const { species, exact } = fewestToLeaveOut(withMissing(n, missing));
				const covers = (left: (i: number) => boolean) => missing.every(([i, j]) => left(i) || left(j));
				const sizes = Array.from({ length: 2 ** n }, (_, set) => set)
					.filter((set) => covers((i) => ((set >> i) & 1) === 1))
					.map((set) => set.toString(2).replaceAll('0', '').length);
				expect(exact).toBe(true);
				expect(covers((i) => species.includes(`S${i}`))).toBe(true);
				expect(species).toHaveLength(Math.min(...sizes));
			})
		);
	});

	it('says when it did not search for certain, and still leaves no pair missing', () => {
		const n = 80;
		const missing = Array.from({ length: n }, (_, i) => [1, 7, 23].map((step) => [i, (i + step) % n] as const)).flat();
		const { species, exact } = fewestToLeaveOut(withMissing(n, missing));
		expect(exact).toBe(false);
		expect(missing.every(([i, j]) => species.includes(`S${i}`) || species.includes(`S${j}`))).toBe(true);
		expect(fewestToLeaveOut(withMissing(n, missing)).species).toEqual(species);
	});
});
