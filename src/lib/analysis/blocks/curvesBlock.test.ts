import { describe, expect, it } from 'vitest';
import { analysisResultSchema } from '#lib/contracts/analysisResult.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';

const result = analyse(MICRO_INPUTS, microPlan());

describe('ageClassesBlock', () => {
	it('tells each node of the worked example as a class of its own', () => {
		// By hand: AB .8; AC, BC .65; AD, BD, CD 1.3/3.
		const classes = result.ageClasses ?? [];
		expect(classes.map(({ from, to, nodes, pairs }) => [from, to, nodes, pairs])).toEqual([
			[1, 1, 1, 1],
			[2, 2, 1, 2],
			[4, 4, 1, 3]
		]);
		for (const [i, mean] of [0.8, 0.65, 1.3 / 3].entries()) expect(classes[i]?.mean).toBeCloseTo(mean, 12);
	});
});

describe('fallBlock', () => {
	it('gives the half-overlap age of the worked example and no k', () => {
		// R 4.2, see the test of the fit: 3.80587279598113.
		expect(result.fall?.fits[0]?.halfOverlapAge).toBeCloseTo(3.80587279598113, 9);
		expect(result.fall?.speciesSimulated).toBe(4);
		expect(JSON.stringify(result.fall)).not.toContain('"k"');
	});

	it('is absent for a measure without the curve', () => {
		expect(analyse({ ...MICRO_INPUTS, measure: 'pianka' }, microPlan()).fall).toBeUndefined();
	});

	it('stays on the scale of overlap when the test does not', () => {
		expect(analyse(MICRO_INPUTS, microPlan({ transform: 'logit' })).fall?.fits).toEqual(result.fall?.fits);
	});
});

describe('influenceBlock', () => {
	it('gives the four slopes of the worked example, their range, and who moves the slope most', () => {
		// Worked example: leaving out A -0.075, B -0.125, C -0.1333, D -0.15; all pairs -0.11698, so A moves it by .042.
		const slopes = result.influence?.slopes ?? [];
		expect(slopes.map(({ species }) => species)).toEqual(['A', 'B', 'C', 'D']);
		for (const [i, slope] of [-0.075, -0.125, -2 / 15, -0.15].entries()) expect(slopes[i]?.slope).toBeCloseTo(slope, 12);
		expect(result.influence?.mostInfluential).toBe('A');
		expect(result.influence?.range[0]).toBeCloseTo(-0.15, 12);
		expect(result.influence?.range[1]).toBeCloseTo(-0.075, 12);
	});
});

describe('powerBlock', () => {
	it('tells that four species can detect nothing', () => {
		// The smallest p of this tree is 1/12, above .05: exact, so never reached.
		expect(result.power?.truths).toHaveLength(6);
		for (const { power } of result.power?.rows ?? []) expect(Math.max(...power)).toBe(0);
	});

	it('spends half of alpha on each side, and is absent where simulations cannot reach it', () => {
		expect(analyse(MICRO_INPUTS, microPlan({ alternative: 'two-sided' })).power?.alpha).toBe(0.025);
		expect(analyse(MICRO_INPUTS, microPlan({ alpha: 0.0001 })).power).toBeUndefined();
	});
});

describe('curves of a result', () => {
	it('read back as they were stored', () => {
		const { ageClasses, fall, influence, power } = analysisResultSchema.parse(JSON.parse(JSON.stringify(result)));
		expect({ ageClasses, fall, influence, power }).toEqual({
			ageClasses: result.ageClasses,
			fall: result.fall,
			influence: result.influence,
			power: result.power
		});
	});
});
