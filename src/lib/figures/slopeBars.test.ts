import { describe, expect, it } from 'vitest';
import { slopeBars } from './slopeBars.ts';

describe('slopeBars', () => {
	const frame = { left: 10, width: 200, height: 60 };

	// By hand: −2 to 2 over 200 units is 50 a unit from 10 on; 4 of 4 is full height, 1 of 4 a quarter.
	it('lays the bins out from left to right, the fullest one at full height', () => {
		const { bars } = slopeBars({ edges: [-1, 0, 1, 2], counts: [4, 0, 1] }, -2, frame);
		expect(bars).toEqual([
			{ x: 60, width: 50, height: 60 },
			{ x: 160, width: 50, height: 15 }
		]);
	});

	it('has room for the observed slope and for no slope at all', () => {
		const { x } = slopeBars({ edges: [1, 2], counts: [3] }, 5, frame);
		expect(x.domain()).toEqual([0, 5]);
	});

	it('writes its ticks with a true minus', () => {
		const { ticks } = slopeBars({ edges: [-1, 1], counts: [3] }, -1, frame);
		expect(ticks[0]?.text).toBe('−1');
	});
});
