import { describe, expect, it } from 'vitest';
import { homeDistances } from './homeDistance.ts';

const at = (latitude: number, longitude: number): { cell: number; latitude: number; longitude: number } => ({
	cell: 0,
	latitude,
	longitude
});

describe('homeDistances', () => {
	// By hand: a degree of a great circle is 6371.0088 × π / 180 = 111.1951 km, a quarter of the circle 10007.557 km.
	it('measures along great circles between the middles of the records', () => {
		const [[, oneDegree], [, , quarter]] = [
			homeDistances([[at(0, -1), at(0, 1)], [at(1, 0)]])[0] ?? [],
			homeDistances([[at(0, 0)], [at(0, 45)], [at(0, 90)]])[0] ?? []
		];
		expect(oneDegree).toBeCloseTo(111.1951, 3);
		expect(quarter).toBeCloseTo(10007.557, 2);
	});

	it('is symmetric and 0 on the diagonal', () => {
		const [[same, there] = [], [back] = []] = homeDistances([[at(36, -150)], [at(41, -144)]]);
		expect(same).toBe(0);
		expect(there).toBe(back);
	});
});
