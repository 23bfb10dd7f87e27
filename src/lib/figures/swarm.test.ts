import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { swarm } from './swarm.ts';

describe('swarm', () => {
	it('leaves dots that do not touch in the middle', () => {
		expect(swarm([0, 10, 20], 2)).toEqual([0, 0, 0]);
	});

	it('keeps all dots apart', () => {
		fc.assert(
			fc.property(fc.array(fc.double({ min: 0, max: 40, noNaN: true }), { maxLength: 12 }), (heights) => {
				const offsets = swarm(heights, 3);
				for (let a = 0; a < heights.length; a++) {
					for (let b = 0; b < a; b++) {
						const distance = Math.hypot((offsets[a] ?? 0) - (offsets[b] ?? 0), (heights[a] ?? 0) - (heights[b] ?? 0));
						expect(distance).toBeGreaterThan(5.9); // two radii, less the hair that the swarm allows
					}
				}
			})
		);
	});

	it('deals equal heights to the middle, right and left by turns', () => {
		expect(swarm([5, 5, 5], 2).map(Math.sign)).toEqual([0, 1, -1]);
	});
});
