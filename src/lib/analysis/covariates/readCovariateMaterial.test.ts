import { describe, expect, it } from 'vitest';
import { readCovariateMaterial } from './readCovariateMaterial.ts';

const PLACES = 'species,latitude,longitude\nAlpha,0,0\nBeta,0,90\nGamma,90,0';

describe('readCovariateMaterial', () => {
	// methods 10: a quarter of the great circle of R = 6371.0088 km is 10 007.557 km, here between all three.
	it('computes great-circle distances from a table of places', () => {
		const { species, lower, reading } = readCovariateMaterial({ places: PLACES, scale: 'plain' });
		expect(species).toEqual(['Alpha', 'Beta', 'Gamma']);
		for (const km of lower) expect(km).toBeCloseTo(10_007.557, 3);
		expect(reading).toEqual({ source: 'places', kind: 'distance', scale: 'plain', unit: 'km', separator: ',' });
	});

	// By hand: ln(1 + 0) = 0, ln(1 + 9) = ln 10.
	it('takes the logarithm of 1 + value when asked', () => {
		const csv = 'species,Alpha,Beta,Gamma\nAlpha\nBeta,9\nGamma,0,99';
		const { lower, reading } = readCovariateMaterial({ csv, scale: 'log' });
		expect([...lower]).toEqual([Math.log(10), 0, Math.log(100)].map((value) => expect.closeTo(value, 14)));
		expect(reading).toMatchObject({ source: 'matrix', scale: 'log', unit: null });
	});
});
