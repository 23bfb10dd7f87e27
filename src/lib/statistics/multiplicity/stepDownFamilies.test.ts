import { describe, expect, it } from 'vitest';
import { nextUniform, randomStream } from '../randomStream.ts';
import { stepDownFamilies } from './stepDownFamilies.ts';

const open = (...p: number[]) => ({ p, smallestP: 0 });

describe('stepDownFamilies', () => {
	// By hand: 1 - .99^3 = .029701 for the smallest of three, 1 - .98^2 = .0396 for the next, then .5 as it is.
	it('raises the smallest p by the number of families, the next by one fewer', () => {
		const { adjusted } = stepDownFamilies([open(0.5), open(0.01), open(0.02)], 0.05);
		expect(adjusted[1]?.[0]).toBeCloseTo(0.029701, 12);
		expect(adjusted[2]?.[0]).toBeCloseTo(0.0396, 12);
		expect(adjusted[0]?.[0]).toBeCloseTo(0.5, 12);
	});

	// By hand: the second family comes after the first, so no p of it is below the first's .0199; .3 of the first family
	// stands at the first step, 1 - .7^2 = .51.
	it('keeps the order of the steps and places a family by its smallest p', () => {
		const { adjusted } = stepDownFamilies([open(0.01, 0.3), open(0.0100001)], 0.05);
		expect(adjusted[0]?.[0]).toBeCloseTo(0.0199, 12);
		expect(adjusted[0]?.[1]).toBeCloseTo(0.51, 12);
		expect(adjusted[1]?.[0]).toBeCloseTo(0.0199, 12);
	});

	// By hand: at K = 1 one family reaches .05, so one is tested and pays nothing for the two that never could.
	it('charges nothing for families that no data could bring to the level', () => {
		const never = { p: [0.25], smallestP: 0.25 };
		const { testable, adjusted } = stepDownFamilies([never, { p: [0.04], smallestP: 0.01 }, never], 0.05);
		expect(testable).toEqual([false, true, false]);
		expect(adjusted[0]).toBeNull();
		expect(adjusted[1]?.[0]).toBeCloseTo(0.04, 12);
	});

	// By hand: smallest p .03 and .03: at K = 1 two families reach .05, more than 1; at K = 2 none reaches .0253.
	it('tests none when each could only be tested alone', () => {
		const alone = { p: [0.03], smallestP: 0.03 };
		expect(stepDownFamilies([alone, alone], 0.05)).toEqual({ testable: [false, false], adjusted: [null, null] });
	});

	// Property: with uniform independent p-values any rejection is false; 4,000 trials, .05 ± 4 standard errors (.0034).
	it('finds something in about α of trials where nothing is to be found', () => {
		const stream = randomStream(11, 0, 8);
		let wrong = 0;
		for (let trial = 0; trial < 4000; trial++) {
			const families = Array.from({ length: 12 }, () => open(nextUniform(stream)));
			if (stepDownFamilies(families, 0.05).adjusted.some((p) => (p?.[0] ?? 1) <= 0.05)) wrong++;
		}
		expect(wrong / 4000).toBeGreaterThan(0.05 - 4 * 0.0034);
		expect(wrong / 4000).toBeLessThan(0.05 + 4 * 0.0034);
	});
});
