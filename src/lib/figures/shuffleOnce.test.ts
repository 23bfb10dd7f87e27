import { describe, expect, it } from 'vitest';
import { MICRO_SLOPES, microPlate } from './microPlate.fixture.ts';
import { dealtInput, shuffleOnce } from './shuffleOnce.ts';

describe('shuffleOnce', () => {
	it('deals every species once and gives a slope of the published table', () => {
		for (let step = 0; step < 50; step++) {
			const { dealt, slope } = shuffleOnce(microPlate(), 7, step);
			expect([...dealt].sort()).toEqual([0, 1, 2, 3]);
			expect(Math.min(...MICRO_SLOPES.map((known) => Math.abs(known - slope)))).toBeLessThan(1e-12);
		}
	});

	it('deals alike for the same seed and step, and otherwise differently', () => {
		expect(shuffleOnce(microPlate(), 7, 3)).toEqual(shuffleOnce(microPlate(), 7, 3));
		const orders = Array.from({ length: 40 }, (_, step) => shuffleOnce(microPlate(), 7, step).dealt.join(''));
		expect(new Set(orders).size).toBeGreaterThan(12); // of 24; forty fair deals show 19 or so
	});
});

describe('dealtInput', () => {
	// By hand: D C B A on the tips; the first pair is then D–C, 0.5, and the last, of tips 3 and 4, B–A, 0.8.
	it('moves names and overlaps together and leaves the observed line', () => {
		const moved = dealtInput(microPlate(), [3, 2, 1, 0]);
		expect(moved.plate.species).toEqual(['D', 'C', 'B', 'A']);
		expect(moved.plate.overlapLower).toEqual([0.5, 0.4, 0.6, 0.4, 0.7, 0.8]);
		expect(moved.regression).toEqual(microPlate().regression);
	});
});
