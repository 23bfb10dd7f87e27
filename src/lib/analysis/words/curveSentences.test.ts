import { describe, expect, it } from 'vitest';
import type { FallBlock, PowerBlock } from '#lib/contracts/resultBlocks.ts';
import {
	ageClassSentence,
	ageWindowSentence,
	fallCaution,
	fallSentence,
	influenceSentence,
	noFallSentence,
	planPowerSentence,
	powerSentence
} from './curveSentences.ts';

// Expected texts by hand, from the numbers given here.
const scale = { ageUnit: 'Ma', rootAge: 18.4, youngestAge: 0.5 } as const;

describe('ageClassSentence', () => {
	const young = { from: 0.5, to: 3, nodes: 8, pairs: 9, mean: 0.62, shuffled: [0.3, 0.4, 0.5] as [number, number, number] };
	const old = { ...young, from: 12, to: 18.4, mean: 0.31, shuffled: [0.3, 0.4, 0.5] as [number, number, number] };

	it('tells both ends and how many classes lie outside', () => {
		expect(ageClassSentence([young, old], scale)).toBe(
			'Mean overlap is 0.62 where species parted at 0.5 to 3.0 Ma and 0.31 where they parted at 12.0 to 18.4 Ma. ' +
				'1 of the 2 classes of age lies outside the middle 95 % of shuffled species.'
		);
		expect(ageClassSentence([old, old], scale)).toContain('None of the 2 classes of age lie outside');
	});

	it('says nothing of a single class', () => expect(ageClassSentence([young], scale)).toBeNull());
});

describe('fallSentence and fallCaution', () => {
	const fit = (axes: number, halfOverlapAge: number | null, word: FallBlock['fits'][number]['shape']['word']) => ({
		axes,
		halfOverlapAge,
		range: [3.1, null] as [number, null],
		curve: [],
		shape: { word, youngResidual: 0, p: 0.5, size: 0.9 }
	});
	const fall: FallBlock = {
		fits: [fit(1, 5.24, 'follows'), fit(2, 0.2, 'follows'), fit(4, null, 'follows')],
		withFloor: { floor: 0.3, halfOverlapAge: null },
		withCeiling: { ceiling: 0.8, halfOverlapAge: 2.2 },
		simulations: 199,
		speciesSimulated: 26
	};

	it('gives ages inside the tree only, and says where others lie', () => {
		expect(fallSentence(fall, scale)).toBe(
			'The curve of niches that walk at random on one axis, fitted to these overlaps, passes one half at 5.2 Ma ' +
				'(5 to 95 %: from 3.1 to over 18.4 Ma); before the youngest common ancestor (under 0.5 Ma) on 2 and ' +
				'beyond the root (over 18.4 Ma) on 4 axes. Young pairs follow that curve.'
		);
	});

	it.each([
		['more-alike', 'Young pairs are more alike than that curve.'],
		['less-alike-then-level', 'Young pairs are less alike than that curve, then overlap stays level.']
	] as const)('says %s only when every number of axes says so', (word, sentence) => {
		const alike = { ...fall, fits: fall.fits.map((one) => ({ ...one, shape: { ...one.shape, word } })) };
		expect(fallSentence(alike, scale)).toContain(sentence);
		const parted = { ...fall, fits: [...alike.fits.slice(0, 2), fit(4, 1, 'follows')] };
		expect(fallSentence(parted, scale)).toContain('depends on the number of axes assumed.');
	});

	it('says why a measure has no curve', () => {
		expect(noFallSentence('pianka')).toContain('These overlaps are Pianka’s overlap, so no curve is drawn.');
		expect(noFallSentence('warren-i')).toBeNull();
	});

	it('says that the age is not comparable, and what a floor and a ceiling would do', () => {
		const caution = fallCaution(fall, scale);
		expect(caution).toContain('not comparable between studies');
		expect(caution).toContain('Over a floor of 30 % that all pairs share, the same overlaps would pass one half beyond the root');
		expect(caution).toContain('under a ceiling of 0.8 at 2.2 Ma');
	});
});

describe('influenceSentence', () => {
	const slopes = [
		{ species: 'Lychnorana rufula', slope: -0.02 },
		{ species: 'Lychnorana tumida', slope: -0.01 }
	];

	it('tells the range, who moves the slope most, and whether its direction hangs on one species', () => {
		const influence = { slopes, range: [-0.02, -0.01] as [number, number], mostInfluential: 'Lychnorana rufula' };
		expect(influenceSentence(influence, -0.015, 'Ma')).toBe(
			'With one species left out at a time, the slope over all pairs lies from −0.0200 to −0.0100 per Myr; ' +
				'Lychnorana rufula moves it most. No single species turns its direction.'
		);
		expect(influenceSentence(influence, 0.001, 'Ma')).toContain(
			'It changes direction without Lychnorana rufula, or without Lychnorana tumida.'
		);
	});
});

describe('powerSentence', () => {
	const power: PowerBlock = {
		simulations: 200,
		shuffles: 199,
		speciesSimulated: 26,
		alpha: 0.05,
		truths: [
			{ theta: 0.25, axes: 1 },
			{ theta: 1, axes: 1 },
			{ theta: 1, axes: 2 }
		],
		rows: [
			{ statistic: 'slope', power: [0.62, 0.74, 0.92] },
			{ statistic: 'nodes-plain', power: [0.9, 0.9, 1] }
		],
		standardError: 0.03,
		recommended: 'nodes-plain'
	};

	it('tells what the plan’s statistic could find, and which does best', () => {
		expect(powerSentence(power, 'slope')).toBe(
			'What this design could have detected: had niches walked at random along this tree, the slope over all pairs would have found overlap ' +
				'falling in 62 to 74 % of cases with one niche axis and 92 % with two. Over all of them the slope of node means, every pair ' +
				'equal does best: 90 % of cases with one niche axis and 100 % with two.'
		);
		expect(planPowerSentence(power, 'slope')).toBe(
			'Had niches walked at random along this tree, the slope over all pairs would find overlap falling in 62 to 74 % of cases with one ' +
				'niche axis and 92 % with two; the slope of node means, every pair equal would do best, in 90 % of cases with one niche axis and 100 % with two.'
		);
		expect(planPowerSentence(power, 'nodes-plain')).toContain(': the most of all statistics here.');
		expect(powerSentence(power, 'nodes-plain')).toContain('No other statistic does better over all of them.');
	});
});

describe('ageWindowSentence', () => {
	it('tells the range with how little stands behind it', () => {
		const seen = { pairs: 4, nodes: 1, range: { lowest: 0.48, highest: 0.83 } };
		expect(ageWindowSentence(seen, 3, 5, scale)).toBe(
			'Pairs that parted at 3.0 to 5.0 Ma: overlap 0.48 to 0.83, 4 pairs, 1 node; no more is known.'
		);
		const none = { pairs: 0, nodes: 0, range: null };
		expect(ageWindowSentence(none, 3, 5, scale)).toBe('No pair here parted at 3.0 to 5.0 Ma: nothing is known of such pairs.');
	});
});
