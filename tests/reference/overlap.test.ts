import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { morisitaHorn, pianka, schoenersD, spearmanCells, warrensI } from '#lib/overlap/measures.ts';
import { dropMissingCells } from '#lib/overlap/suitability.ts';

type Case = { name: string; p: number[]; q: number[]; D: number; I: number };
type Reference = {
	pairs: Case[];
	masked: { p: (number | null)[]; q: (number | null)[]; D: number; I: number; cells_used: number };
	table: { table: number[][]; D_lower: number[]; I_lower: number[] };
	surfaces: { params: Record<'a' | 'b' | 'c', number[]>; D: Record<string, number>; I: Record<string, number> };
	errors: { p: number[]; q: number[] }[];
};

// Computed with R 4.2.2 and vegan 2.6-4 (D from Bray–Curtis on shares, I from Hellinger distance); see the file.
// The shape is what the file documents of itself.
const reference = JSON.parse(
	readFileSync(new URL('../../fixtures/reference/overlap.json', import.meta.url), 'utf8')
) as Reference;

describe('D and I against an independent implementation', () => {
	it.each(reference.pairs)('agree on $name', ({ p, q, D, I }) => {
		expect(schoenersD(p, q)).toBeCloseTo(D, 14);
		expect(warrensI(p, q)).toBeCloseTo(I, 14);
	});

	it('agree over the cells that both species have', () => {
		const [p, q] = [reference.masked.p, reference.masked.q].map((values) => values.map((value) => value ?? Number.NaN));
		const { vectors, kept } = dropMissingCells([p ?? [], q ?? []]);
		expect(kept).toHaveLength(reference.masked.cells_used);
		expect(schoenersD(vectors[0] ?? [], vectors[1] ?? [])).toBeCloseTo(reference.masked.D, 14);
		expect(warrensI(vectors[0] ?? [], vectors[1] ?? [])).toBeCloseTo(reference.masked.I, 14);
	});

	it('agree on all 276 pairs of 24 vegetation plots', () => {
		const { table, D_lower, I_lower } = reference.table;
		const pairs = table.flatMap((q, j) => table.slice(j + 1).map((p) => [p, q] as const));
		expect(pairs).toHaveLength(276);
		for (const [k, [p, q]] of pairs.entries()) {
			expect(schoenersD(p, q)).toBeCloseTo(D_lower[k] ?? NaN, 13);
			expect(warrensI(p, q)).toBeCloseTo(I_lower[k] ?? NaN, 13);
		}
	});

	it('agree on three surfaces of 5,000 cells', () => {
		const surface = ([mx = 0, my = 0, sx = 1, sy = 1]: number[]) =>
			Array.from({ length: 5000 }, (_, c) =>
				Math.exp(-0.5 * (((c % 100) - mx) / sx) ** 2 - 0.5 * ((Math.floor(c / 100) - my) / sy) ** 2)
			);
		const { a, b, c } = reference.surfaces.params;
		for (const [key, p, q] of [
			['ab', a, b],
			['ac', a, c],
			['bc', b, c]
		] as const) {
			expect(schoenersD(surface(p), surface(q))).toBeCloseTo(reference.surfaces.D[key] ?? NaN, 12);
			expect(warrensI(surface(p), surface(q))).toBeCloseTo(reference.surfaces.I[key] ?? NaN, 12);
		}
	});

	it.each(reference.errors)('refuses $p with $q', ({ p, q }) => {
		for (const measure of [schoenersD, warrensI]) expect(() => measure(p, q)).toThrow(/^Expected/);
	});
});

// Four species over five cells; D by hand in tenths, the rest worked out in exact roots and printed to twelve digits.
describe('the measures on the worked example of four species', () => {
	const suitability = { A: [4, 3, 2, 1, 0], B: [3, 4, 1, 1, 1], C: [1, 3, 4, 2, 0], D: [0, 1, 2, 3, 4] };
	it.each([
		['A', 'B', [0.8, 0.934241679265, 0.931588505112, 0.931034482759, 0.782623792125]],
		['A', 'C', [0.7, 0.924264068712, 0.766666666667, 0.766666666667, 0.3]],
		['B', 'C', [0.6, 0.861036598508, 0.724568837309, 0.724137931034, 0.111803398875]],
		['A', 'D', [0.4, 0.546410161514, 0.333333333333, 0.333333333333, -1]],
		['B', 'D', [0.4, 0.714626436994, 0.448542613573, 0.448275862069, -0.782623792125]],
		['C', 'D', [0.5, 0.70099676751, 0.566666666667, 0.566666666667, -0.3]]
	] as const)('give the values of %s and %s', (first, second, expected) => {
		const [p, q] = [suitability[first], suitability[second]];
		const got = [schoenersD, warrensI, pianka, morisitaHorn, spearmanCells].map((measure) => measure(p, q));
		for (const [k, value] of expected.entries()) expect(got[k]).toBeCloseTo(value, 11);
	});

	it('order the pairs BD and CD differently in D and I', () => {
		const { B, C, D } = suitability;
		expect(schoenersD(C, D)).toBeGreaterThan(schoenersD(B, D));
		expect(warrensI(B, D)).toBeGreaterThan(warrensI(C, D));
	});
});
