import { describe, expect, it } from 'vitest';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { analysisResultSchema } from '#lib/contracts/analysisResult.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { previewAnalysis } from '../previewAnalysis.ts';

const clades = { minTips: 3 };

/** Two clades of three, a–c and d–f; overlap .9 for pairs of one letter of `letters`, .1 for the others. */
function sixSpecies(letters: string): AnalysisInputs {
	const lower = [...letters].flatMap((a, i) => [...letters.slice(0, i)].map((b) => (a === b ? 0.9 : 0.1)));
	return {
		...MICRO_INPUTS,
		treeText: '(((a:1,b:1):1,c:2):1,((d:1,e:1):1,f:2):1);',
		overlap: { species: [...'abcdef'], lower: Float64Array.from(lower), remarks: [] }
	};
}

describe('cladesBlock', () => {
	it('is absent unless the plan asks for it', () => {
		const result = analyse(MICRO_INPUTS, microPlan());
		expect(result.clades).toBeUndefined();
		expect(result.cladeTest).toBeUndefined();
	});

	// Exact fractions of the worked example: within A, B, C 7/10, with D 13/30, 6 of 24 arrangements.
	it('finds the clade of the worked example, which three of four species cannot make rare', () => {
		const result = analyse(MICRO_INPUTS, microPlan({ clades }));
		expect(result.cladeTest).toEqual({ exact: true, count: 24, minTips: 3 });
		expect(result.clades).toHaveLength(1);
		const [row] = result.clades ?? [];
		expect(row).toMatchObject({
			label: 'A–C',
			age: 2,
			tips: 3,
			members: [0, 1, 2],
			declared: false,
			p: 6 / 24,
			pAdjusted: 6 / 24
		});
		expect(row?.meanWithin).toBeCloseTo(7 / 10, 12);
		expect(row?.meanBetween).toBeCloseTo(13 / 30, 12);
		expect(row).toMatchObject({ testable: false, holds: false, pBeyondParent: null, parent: { node: 0, tips: 4 } });
		expect(row?.whyNotTestable).toBe('Too few ways to choose 3 of the 4 species: p cannot be below 0.25.');
		expect(row?.whyNotBeyond).toContain('directly below the root');
		expect(analysisResultSchema.parse(result).clades).toEqual(result.clades);
	});

	// By hand: the halves differ by .8, as 2 of C(6, 3) = 20 choices do; AB inside ABC could be chosen in 3 ways.
	it('tells p among all species, and why a clade of two cannot be asked inside one of three', () => {
		const rows = analyse(sixSpecies('aaabbb'), microPlan({ clades: { minTips: 2 } })).clades ?? [];
		expect(rows.map(({ label, p }) => [label, p])).toEqual([
			['a–c', 2 / 20],
			['a–b', 6 / 15],
			['d–f', 2 / 20],
			['d–e', 6 / 15]
		]);
		expect(rows[1]).toMatchObject({ pBeyondParent: 1, pBeyondParentAdjusted: null, parent: { label: 'a–c', tips: 3 } });
		expect(rows[1]?.whyNotBeyond).toBe('Too few ways to choose 2 of the 3 species of the clade above: p cannot be below 0.33.');
	});

	it('takes groups declared beforehand in place of all clades, a clade of the tree or not', () => {
		const declared = [
			['b', 'a', 'c'],
			['a', 'd', 'e', 'f'],
			['c', 'a', 'b']
		];
		const result = analyse(sixSpecies('abbabb'), microPlan({ clades: { minTips: 3, declared } }));
		expect(result.cladeTest?.minTips).toBeNull();
		expect(result.clades?.map(({ label, node, declared: told }) => [label, node, told])).toEqual([
			['a–c', 1, true],
			['a, d and 2 more', null, true]
		]);
		expect(result.clades?.[1]).toMatchObject({ age: null, parent: null, pBeyondParent: null, holds: false });
		expect(result.clades?.[1]?.whyNotBeyond).toContain('no clade of this tree');
	});

	it.each([
		['names that are not compared', [['a', 'g', 'h']], 'A declared clade names species that are not compared: g, h.'],
		['all species but one', [['a', 'b', 'c', 'd', 'e']], '2 to 4 of the 6 species compared; one has 5'],
		['one species named twice', [['a', 'a']], 'one has 1']
	])('refuses %s before anything runs', (_, declared, sentence) => {
		expect(() => previewAnalysis(sixSpecies('aaabbb'), microPlan({ clades: { minTips: 3, declared } }))).toThrow(sentence);
	});

	it('refuses a size that no clade inside the tree has', () => {
		const ask = () => previewAnalysis(MICRO_INPUTS, microPlan({ clades: { minTips: 4 } }));
		expect(ask).toThrow('No clade inside the tree of these 4 species has 4 species or more.');
	});
});

describe('sistersBlock', () => {
	// By hand: A and B are the only sisters, .8; the other five sum to 2.6.
	it('tells sister species from the rest without a p', () => {
		const { sisters } = analyse(MICRO_INPUTS, microPlan());
		expect(sisters).toMatchObject({ cherries: 1, others: 5 });
		expect(sisters?.meanCherries).toBeCloseTo(0.8, 14);
		expect(sisters?.meanOthers).toBeCloseTo(0.52, 14);
	});

	it('is absent where no two species are sisters', () => {
		const inputs = { ...MICRO_INPUTS, treeText: '((A:1,B:1,C:1):3,D:4);' };
		expect(analyse(inputs, microPlan()).sisters).toBeUndefined();
	});
});
