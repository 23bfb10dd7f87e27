import { describe, expect, it } from 'vitest';
import { NOTHING_KNOWN } from '#lib/contracts/treeAbout.ts';
import { findFinding, findingKind } from './finding.ts';
import type { FindingFacts } from './findingFacts.ts';

type Permutation = FindingFacts['permutation'];
type Within = NonNullable<Permutation['withinDeepestSplit']>;

const within: Within = {
	pLess: 0.01,
	pGreater: 0.99,
	pTwoSided: 0.02,
	sides: [12, 14],
	rootPairShare: 0.1,
	exact: false,
	count: 9999,
	smallestP: 0.0001
};
const permutation: Permutation = {
	statistic: 'slope',
	observed: -0.0163,
	count: 9999,
	exact: false,
	asExtreme: 15,
	p: 0.0016,
	pLess: 0.0016,
	pGreater: 0.9985,
	pTwoSided: 0.0032,
	monteCarloStandardError: 0.0004,
	interval: [0.0008, 0.0025],
	smallestP: 0.0001,
	distinctAges: 25,
	moments: { statistic: 'z', mean: 0, variance: 1, skewness: 0 },
	quantiles: [],
	withinDeepestSplit: within
};
const falling: FindingFacts = {
	measure: 'schoener-d',
	ageUnit: 'Ma',
	alpha: 0.05,
	alternative: 'less',
	species: 26,
	pairs: 325,
	slope: -0.0163,
	r: -0.3,
	meanOverlap: 0.4,
	rootAge: 18.4,
	nodeAges: [18.4, 9, 3],
	permutation,
	momentP: 0.0017,
	transformed: false,
	polytomies: 0
};

function facts(change: Partial<FindingFacts>, test: Partial<Permutation> = {}): FindingFacts {
	return { ...falling, ...change, permutation: { ...permutation, ...test } };
}
const codes = (given: FindingFacts) => findFinding(given).cautions.map((caution) => caution.code);

// The expected kinds are the rows of docs/decisions/0006-claims.md.
describe('findingKind', () => {
	it('says signal when overlap falls and falls within the deepest split too', () => {
		expect(findingKind(falling)).toBe('signal');
	});

	it('says one old divergence when the fall is gone within the deepest split', () => {
		expect(findingKind(facts({}, { withinDeepestSplit: { ...within, pLess: 0.4, pGreater: 0.6, pTwoSided: 0.8 } }))).toBe(
			'one-old-divergence'
		);
	});

	it('keeps signal, with a caution, when the test within the split could not have spoken', () => {
		const blunt = facts({}, { withinDeepestSplit: { ...within, pLess: 0.5, pTwoSided: 1, smallestP: 0.2 } });
		expect(findingKind(blunt)).toBe('signal');
		expect(codes(blunt)).toContain('split-untestable');
	});

	it('never raises a claim from the test within the split', () => {
		expect(findingKind(facts({}, { p: 0.34, pLess: 0.34, pGreater: 0.66, pTwoSided: 0.68 }))).toBe('within-split-only');
	});

	it('says none detected when neither test falls', () => {
		const flat = facts(
			{},
			{ p: 0.34, pLess: 0.34, pTwoSided: 0.68, withinDeepestSplit: { ...within, pLess: 0.3, pTwoSided: 0.6 } }
		);
		expect(findingKind(flat)).toBe('none-detected');
	});

	it('reads a rise only from the two-sided p', () => {
		const rising = {
			observed: 0.02,
			pLess: 0.98,
			pGreater: 0.03,
			p: 0.98,
			pTwoSided: 0.06,
			withinDeepestSplit: { ...within, pLess: 0.9, pGreater: 0.1, pTwoSided: 0.2 }
		};
		expect(findingKind(facts({ slope: 0.02 }, rising))).toBe('none-detected');
		expect(findingKind(facts({ slope: 0.02 }, { ...rising, pGreater: 0.01, pTwoSided: 0.02 }))).toBe('rises-with-age');
	});

	it('says stronger than a random walk only beside signal, with a K that random walks hardly reach', () => {
		const k = { value: 1.7, p: 0.001, exact: false, count: 9999, pAdjusted: 0.001, pAboveRandomWalk: 0.01 };
		const variable = {
			variable: 'warmth',
			role: 'position',
			species: 26,
			leftOut: [],
			k,
			lambda: null,
			models: [],
			measurementError: false,
			notes: []
		} as const;
		const signal = { table: 'Positions', variables: [{ ...variable, leftOut: [], models: [], notes: [] }] };
		expect(findingKind(facts({ signal }))).toBe('stronger-than-random-walk');
		expect(findFinding(facts({ signal })).sentence).toContain(
			'in warmth relatives are nearer than a random walk along the tree would leave them'
		);
		expect(findingKind(facts({ signal }, { p: 0.3, pLess: 0.3, withinDeepestSplit: null }))).toBe('none-detected');
	});

	it('says too few when no arrangement could have reached alpha', () => {
		expect(findingKind(facts({ species: 4 }, { smallestP: 1 / 12 }))).toBe('too-few');
	});

	it('asks the two-sided p when the plan does', () => {
		expect(
			findingKind(facts({ alternative: 'two-sided' }, { pLess: 0.03, pTwoSided: 0.06, p: 0.06, withinDeepestSplit: null }))
		).toBe('none-detected');
	});
});

describe('findFinding', () => {
	it('never says conserved, proved or significant', () => {
		const finding = findFinding(falling);
		expect(`${finding.title} ${finding.sentence}`).not.toMatch(/conserved|proved|significant/i);
	});

	it('writes the sentence with its numbers', () => {
		expect(findFinding(falling).sentence).toBe(
			'Among 26 species, Schoener’s D is lower by 0.0163 for each million years since common ancestry. 15 of 9,999 shuffles of the species fell as steeply (p = 0.0016). ' +
				'This is phylogenetic signal in niche overlap; it is not yet evidence that niches were held back.'
		);
	});

	it('says what the design could have detected when nothing was', () => {
		const power = {
			simulations: 200,
			speciesSimulated: 26,
			shuffles: 199,
			alpha: 0.05,
			truths: [
				{ theta: 1, axes: 1 },
				{ theta: 1, axes: 2 }
			],
			rows: [{ statistic: 'slope' as const, power: [0.71, 0.94] }],
			standardError: 0.04,
			recommended: 'nodes-plain' as const
		};
		const flat = facts({ power }, { p: 0.34, pLess: 0.34, pTwoSided: 0.68, withinDeepestSplit: null });
		expect(findFinding(flat).sentence).toContain('this test would have found it in 71 % to 94 % of cases');
	});

	it('states the floor when no shuffle was as extreme', () => {
		const floor = facts({}, { asExtreme: 0, p: 1e-5, pLess: 1e-5, count: 99_999 });
		expect(findFinding(floor).sentence).toContain('None of 99,999 shuffles of the species fell as steeply (p ≤ 0.00001).');
	});

	it('counts relabellings when the test is exact', () => {
		const exact = facts(
			{ species: 8 },
			{ exact: true, count: 40_320, asExtreme: 12, p: 12 / 40_320, pLess: 12 / 40_320, interval: null }
		);
		expect(findFinding(exact).sentence).toContain(
			'12 of all 40,320 relabellings of the species fell as steeply, the one observed included (p = 0.00030).'
		);
		// Only the count is a number to be traced; a longer stretch could not wrap on a phone.
		expect(findFinding(exact).parts.find(({ key }) => key === 'shuffles')?.text).toBe('12 of all 40,320');
	});

	it('defers to local regulations and licensed practice in every finding', () => {
		expect(findFinding(falling).limits.join(' ')).toContain('local regulations and licensed practice');
	});
});

describe('cautions', () => {
	it.each([
		['root-pairs', facts({}, { withinDeepestSplit: { ...within, rootPairShare: 0.21 } })],
		['outgroup', facts({}, { withinDeepestSplit: { ...within, sides: [2, 24] } })],
		['undecided', facts({}, { interval: [0.04, 0.06] })],
		['attainable-p', facts({}, { smallestP: 0.02 })],
		['tied-ages', facts({}, { distinctAges: 20 })],
		['all-high', facts({ meanOverlap: 0.95 })],
		['all-low', facts({ meanOverlap: 0.02 })],
		['undated', facts({ ageUnit: 'relative' })],
		['unit-of-age', facts({ rootAge: 410 })],
		['young-nodes', facts({ nodeAges: [18.4, 0.4] })],
		['very-strong', facts({ r: -0.9 })],
		['moments-disagree', facts({ momentP: 0.08 })],
		['polytomies', facts({ polytomies: 2 })],
		['judged-by-other', facts({}, { statistic: 'nodes-plain' })],
		['adjusted-above-level', facts({}, { pAdjusted: 0.07, also: [] })],
		['sampling-unknown', facts({ about: NOTHING_KNOWN })],
		['sampling', facts({ about: { ...NOTHING_KNOWN, speciesInClade: 60 } })],
		['placed-tips', facts({ about: { ...NOTHING_KNOWN, placement: 'some-placed', placedTips: ['A'] } })]
	])('gives %s when its pitfall is present, and not otherwise', (code, present) => {
		expect(codes(present)).toContain(code);
		expect(codes(falling)).not.toContain(code);
	});

	it('says that a rise was not the question asked', () => {
		expect(codes(facts({ slope: 0.02 }, { observed: 0.02, pLess: 0.99, pGreater: 0.01, pTwoSided: 0.02 }))).toContain(
			'other-direction'
		);
	});

	it('gives none when nothing is amiss', () => {
		expect(codes(falling)).toEqual([]);
	});
});
