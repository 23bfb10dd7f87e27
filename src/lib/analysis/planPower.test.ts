import { describe, expect, it } from 'vitest';
import { MICRO_INPUTS, microPlan } from './microResult.fixture.ts';
import { planPower } from './planPower.ts';

describe('planPower', () => {
	it('hangs on the tree and the level, not on overlaps or the seed of the plan', () => {
		const power = planPower(MICRO_INPUTS, microPlan({ alpha: 0.1 }));
		// The worked example's smallest p is 2/24, so a level of .1 can be reached.
		expect(Math.max(...(power?.rows ?? []).flatMap((row) => row.power))).toBeGreaterThan(0);
		const other = { ...MICRO_INPUTS, overlap: { ...MICRO_INPUTS.overlap, lower: Float64Array.of(0.1, 0.2, 0.3, 0.4, 0.5, 0.6) } };
		expect(planPower(other, microPlan({ alpha: 0.1, seed: 77 }))).toEqual(power);
	});

	it('is null at a level that simulations cannot reach', () => {
		expect(planPower(MICRO_INPUTS, microPlan({ alpha: 0.0001 }))).toBeNull();
	});
});
