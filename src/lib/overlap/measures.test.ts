import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { jaccard, morisitaHorn, pianka, rangeOverlap, schoenersD, sorensen, spearmanCells, warrensI } from './measures.ts';
import { dropMissingCells } from './suitability.ts';

const MEASURES = { schoenersD, warrensI, pianka, morisitaHorn, jaccard, sorensen, rangeOverlap, spearmanCells };
const DENSITIES = { schoenersD, warrensI, pianka, morisitaHorn };

const cells = fc.integer({ min: 2, max: 12 });
const vector = (length: number) =>
	fc
		.array(fc.integer({ min: 0, max: 1000 }), { minLength: length, maxLength: length })
		.filter((values) => new Set(values).size > 1);
const pair = cells.chain((length) => fc.tuple(vector(length), vector(length)));

describe('the overlap measures', () => {
	it('give 1 for identical vectors and the same value either way round', () => {
		fc.assert(
			fc.property(pair, ([p, q]) => {
				for (const measure of Object.values(MEASURES)) {
					expect(measure(p, p)).toBeCloseTo(1, 12);
					expect(measure(p, q)).toBeCloseTo(measure(q, p), 12);
				}
				expect([schoenersD(p, p), warrensI(p, p), jaccard(p, p)]).toEqual([1, 1, 1]);
			})
		);
	});

	it('do not change when a vector is scaled or cells are reordered', () => {
		fc.assert(
			fc.property(pair, fc.integer({ min: 1, max: 1000 }), ([p, q], factor) => {
				for (const measure of Object.values(MEASURES)) {
					expect(measure(p, q)).toBeCloseTo(
						measure(
							p.map((value) => value * factor),
							q
						),
						12
					);
					expect(measure(p, q)).toBeCloseTo(measure([...p].reverse(), [...q].reverse()), 12);
				}
			})
		);
	});

	it('do not change when cells empty of both are added, the rank correlation aside', () => {
		fc.assert(
			fc.property(pair, ([p, q]) => {
				const { spearmanCells: _, ...others } = MEASURES;
				for (const measure of Object.values(others)) expect(measure(p, q)).toBeCloseTo(measure([...p, 0, 0], [...q, 0, 0]), 12);
			})
		);
	});

	it('give 0 for vectors that share no cell', () => {
		for (const measure of Object.values({ ...DENSITIES, jaccard, sorensen, rangeOverlap })) {
			expect(measure([1, 2, 0, 0], [0, 0, 3, 1])).toBe(0);
		}
	});

	// Le Cam's inequalities; and the order of the means for Pianka and Morisita–Horn.
	it('keep D <= I <= √(D (2 − D)) and Morisita–Horn <= Pianka', () => {
		fc.assert(
			fc.property(pair, ([p, q]) => {
				const [d, i] = [schoenersD(p, q), warrensI(p, q)];
				expect(i).toBeGreaterThanOrEqual(d - 1e-12);
				expect(i).toBeLessThanOrEqual(Math.sqrt(d * (2 - d)) + 1e-7);
				expect(morisitaHorn(p, q)).toBeLessThanOrEqual(pianka(p, q) + 1e-12);
			})
		);
	});

	it('never fall when neighbouring cells are merged (D and I)', () => {
		const merged = (values: number[]) => values.slice(0, 6).map((value, c) => value + (values[c + 6] ?? 0));
		fc.assert(
			fc.property(vector(12), vector(12), (p, q) => {
				for (const measure of [schoenersD, warrensI]) {
					expect(measure(merged(p), merged(q))).toBeGreaterThanOrEqual(measure(p, q) - 1e-12);
				}
			})
		);
	});

	it('keep the triangle inequality of 1 − D and √(1 − I)', () => {
		fc.assert(
			fc.property(vector(8), vector(8), vector(8), (p, q, r) => {
				const distances = [
					(a: number[], b: number[]) => 1 - schoenersD(a, b),
					(a: number[], b: number[]) => Math.sqrt(Math.max(0, 1 - warrensI(a, b)))
				];
				for (const distance of distances) expect(distance(p, r)).toBeLessThanOrEqual(distance(p, q) + distance(q, r) + 1e-7);
			})
		);
	});

	// Identities of sets: D = a / max, I = a / √(|A||B|) on presences; S = 2 J / (1 + J); a/min >= Ochiai >= S >= a/max >= J.
	it('agree on presences', () => {
		const presence = fc
			.array(fc.integer({ min: 0, max: 1 }), { minLength: 6, maxLength: 6 })
			.filter((values) => values.includes(1));
		fc.assert(
			fc.property(presence, presence, (p, q) => {
				const [j, s, d, i, range] = [jaccard(p, q), sorensen(p, q), schoenersD(p, q), warrensI(p, q), rangeOverlap(p, q)];
				const [a, b] = [p, q].map((values) => values.reduce((sum, value) => sum + value, 0));
				expect(s).toBeCloseTo((2 * j) / (1 + j), 12);
				expect(d).toBeCloseTo((range * Math.min(a ?? 0, b ?? 0)) / Math.max(a ?? 0, b ?? 0), 12);
				for (const [higher, lower] of [
					[range, i],
					[i, s],
					[s, d],
					[d, j]
				])
					expect(higher).toBeGreaterThanOrEqual((lower ?? 0) - 1e-12);
			})
		);
	});

	// By hand: A has 4 cells, B 3, both 2; union 5.
	it('count cells of two ranges', () => {
		const [p, q] = [
			[9, 1, 1, 1, 0, 0],
			[0, 0, 1, 5, 2, 0]
		];
		expect(jaccard(p, q)).toBeCloseTo(2 / 5, 15);
		expect(sorensen(p, q)).toBeCloseTo(4 / 7, 15);
		expect(rangeOverlap(p, q)).toBeCloseTo(2 / 3, 15);
	});

	// By hand: uniform on 2 of 4 nested cells, D = 1/2 and I = √(1/2).
	it('give |A| / |B| and its root for nested uniform vectors', () => {
		expect(schoenersD([1, 1, 0, 0], [1, 1, 1, 1])).toBe(0.5);
		expect(warrensI([1, 1, 0, 0], [1, 1, 1, 1])).toBeCloseTo(Math.SQRT1_2, 14);
	});

	it('refuse vectors that are no suitability', () => {
		for (const measure of Object.values(MEASURES)) {
			expect(() => measure([1, 2], [1, 2, 3])).toThrow('Expected both species over the same cells; they have 2 and 3.');
			expect(() => measure([-1, 2, 3], [1, 2, 3])).toThrow('Expected suitability of at least 0; cell 1 has -1.');
			expect(() => measure([1, 2, 3], [0, 0, 0])).toThrow('a species with none has no overlap');
			expect(() => measure([1, NaN, 3], [1, 2, 3])).toThrow('cell 2 has NaN');
		}
		expect(() => spearmanCells([1, 1, 1], [1, 2, 3])).toThrow('all cells of one species are equal');
	});
});

describe('dropMissingCells', () => {
	it('keeps the cells that every species has, so that missing is not zero', () => {
		const [p, q] = [
			[1, NaN, 3, 4],
			[2, 2, 2, NaN]
		];
		expect(dropMissingCells([p, q])).toEqual({ vectors: [Float64Array.of(1, 3), Float64Array.of(2, 2)], kept: [0, 2] });
		expect(schoenersD([1, 3], [2, 2])).not.toBe(schoenersD([1, 0, 3, 4], [2, 2, 2, 0]));
	});

	it('refuses vectors of different length and vectors without a shared cell', () => {
		expect(() => dropMissingCells([[1], [1, 2]])).toThrow('they have 1 and 2');
		expect(() =>
			dropMissingCells([
				[1, NaN],
				[NaN, 2]
			])
		).toThrow('Expected at least one cell with a value in every species');
	});
});
