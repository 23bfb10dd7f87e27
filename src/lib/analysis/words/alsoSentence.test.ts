import { describe, expect, it } from 'vitest';
import { microResult } from '../microResult.fixture.ts';
import { ALSO_CAUTION, alsoSentence, powerAdvice } from './alsoSentence.ts';

describe('alsoSentence', () => {
	it('is absent where a plan declared a single statistic', () => {
		expect(alsoSentence(microResult())).toBeNull();
	});

	// The worked example: 2 of 24 for the slope and for the nested node slope, in the same arrangements.
	it('tells the adjusted p and how many are within the level', () => {
		expect(alsoSentence(microResult({ alsoTest: ['nodes-nested'], alpha: 0.1 }))).toBe(
			'2 statistics were declared and judged by the same shuffles. Adjusted for their number, the slope over all pairs has p = 0.083, and each of the 2 is within the level of 0.1.'
		);
		expect(alsoSentence(microResult({ alsoTest: ['nodes-nested'] }))).toContain('none of the 2 is within the level of 0.05');
	});

	it('is cautioned that it is no further evidence', () => {
		expect(ALSO_CAUTION).toContain('not further evidence');
	});
});

describe('powerAdvice', () => {
	const power = { simulations: 1, shuffles: 1, speciesSimulated: 26, alpha: 0.05, truths: [], rows: [], standardError: 0 };

	it('says nothing where no power was simulated', () => {
		expect(powerAdvice({ ...microResult(), power: undefined })).toBeNull();
	});

	it('advises for the next plan, never for the data at hand', () => {
		const told = { ...microResult(), power: { ...power, recommended: 'nodes-plain' as const } };
		expect(powerAdvice(told)).toBe(
			'Of the statistics offered, this tree gives most power, by simulation, to the slope of node means, every pair equal: a choice for the next plan, not for these data.'
		);
		expect(powerAdvice({ ...told, power: { ...power, recommended: 'slope' as const } })).not.toContain('next plan');
	});
});
