import { describe, expect, it } from 'vitest';
import { covariateDesign } from './covariateDesign.ts';

const AGES = Float64Array.of(1, 2, 2, 4, 4, 4);
const QUESTION = { ages: { name: 'age', values: AGES }, overlaps: Float64Array.of(0.8, 0.7, 0.6, 0.4, 0.4, 0.5), tipCount: 4 };
const DISTANCE = { name: 'distance', values: Float64Array.of(1, 3, 2, 7, 6, 4) };

function refusal(covariates: readonly { name: string; values: Float64Array }[], overlaps = QUESTION.overlaps): string {
	try {
		covariateDesign({ ...QUESTION, overlaps, covariates });
	} catch (thrown) {
		return thrown instanceof Error ? thrown.message : '';
	}
	return 'accepted';
}

describe('covariateDesign', () => {
	it('refuses a covariate that is a linear function of age, by name', () => {
		expect(refusal([DISTANCE, { name: 'depth', values: AGES.map((age) => 3 * age + 2) }])).toBe(
			'“depth” is a linear function of “age”: their effects cannot be told apart. Leave the covariate out of the plan.'
		);
	});

	it('refuses a covariate that repeats another one, by both names', () => {
		expect(refusal([DISTANCE, { name: 'miles', values: DISTANCE.values.map((km) => km * 0.6214) }])).toContain(
			'“miles” is a linear function of “distance”'
		);
	});

	it('refuses a covariate that the others make up together', () => {
		const sum = { name: 'sum', values: AGES.map((age, pair) => age + (DISTANCE.values[pair] ?? 0)) };
		expect(refusal([DISTANCE, sum])).toContain('“sum” is a linear function of the predictors before it (“age”, “distance”)');
	});

	it('refuses a covariate that is the same for every pair', () => {
		expect(refusal([{ name: 'shared', values: AGES.map(() => 0.3) }])).toContain('“shared” is 0.3 for every pair');
	});

	it('refuses more covariates than the pairs allow', () => {
		const many = [1, 2, 3, 4].map((k) => ({ name: `c${k}`, values: AGES.map((_, pair) => ((pair + 1) ** k * 7919) % 31) }));
		expect(refusal(many)).toContain('6 pairs allow age and at most 3 covariates; the plan has 4.');
	});

	it('refuses covariates from which the overlaps follow', () => {
		expect(
			refusal(
				[DISTANCE],
				DISTANCE.values.map((km) => 1 - km / 10)
			)
		).toContain('nothing is left for age to explain');
	});

	it('names the pair that is not a number', () => {
		expect(refusal([{ name: 'distance', values: Float64Array.of(1, 3, Number.NaN, 7, 6, 4) }])).toContain('“distance” of pair');
	});
});
