import { describe, expect, it } from 'vitest';
import { EARTH_RADIUS_KM, greatCircleDistances, greatCircleKm, sphericalCentroid } from './greatCircle.ts';

type Pair = readonly [number, number];
const point = ([longitude, latitude]: Pair) => ({ longitude, latitude });

/** Longitude, latitude; km by distHaversine of geosphere 1.5-18 (R 4.2.2) with r = 6371.0088. */
const DISTANCES: readonly (readonly [string, Pair, Pair, number])[] = [
	['Paris and New York', [2.3522, 48.8566], [-74.006, 40.7128], 5837.248966566374],
	['Sydney and Santiago over the date line', [151.2093, -33.8688], [-70.6693, -33.4489], 11346.730794085519],
	['a degree of the equator', [0, 0], [1, 0], 111.1950802335329],
	['a degree of a meridian', [0, 0], [0, 1], 111.1950802335329],
	['the poles', [0, 90], [0, -90], 20015.114442035923],
	['antipodes on the equator', [0, 0], [180, 0], 20015.114442035923],
	['a place and itself', [10, 20], [10, 20], 0],
	['a metre', [10, 50], [10, 50.000009], 0.0010007557219453964],
	['a degree across the date line', [179.5, 10], [-179.5, 10], 109.50573519924384]
];

describe('greatCircleKm', () => {
	it.each(DISTANCES)('is as far between %s as the reference says', (_name, a, b, km) => {
		expect(greatCircleKm(point(a), point(b))).toBeCloseTo(km, 8);
		expect(greatCircleKm(point(b), point(a))).toBeCloseTo(km, 8);
	});

	// By hand: a quarter and a half of the circumference.
	it('is a quarter of the circumference from the equator along it, and π R to the antipode', () => {
		expect(greatCircleKm({ latitude: 0, longitude: 0 }, { latitude: 0, longitude: 90 })).toBeCloseTo(
			(Math.PI * EARTH_RADIUS_KM) / 2,
			9
		);
		expect(greatCircleKm({ latitude: 37.2, longitude: 11 }, { latitude: -37.2, longitude: -169 })).toBeCloseTo(20015.1144, 3);
	});

	it('takes longitudes to 360 as those below 0', () => {
		const home = { latitude: 10, longitude: 5 };
		expect(greatCircleKm(home, { latitude: 4, longitude: 350 })).toBeCloseTo(
			greatCircleKm(home, { latitude: 4, longitude: -10 }),
			9
		);
	});
});

describe('sphericalCentroid', () => {
	// Means of unit vectors by R 4.2.2; eight places each.
	it('is the mean direction, in Europe and across the date line', () => {
		const europe: Pair[] = [
			[-1.002, 52.514],
			[7.99, 54.188],
			[1.412, 53.411],
			[-5.497, 41.715],
			[-2.657, 49.871],
			[-5.659, 51.636],
			[-8.509, 49.412],
			[-0.975, 53.835]
		];
		const pacific: Pair[] = [
			[171.254, -29.725],
			[176.707, -10.718],
			[178.604, -3.595],
			[173.432, 9.889],
			[-177.721, -21.122],
			[-174.335, -22.681],
			[-175.897, 7.001],
			[-174.463, 7.082]
		];
		expect(sphericalCentroid(europe.map(point)).longitude).toBeCloseTo(-2.092890899978303, 10);
		expect(sphericalCentroid(europe.map(point)).latitude).toBeCloseTo(50.921735530458726, 10);
		expect(sphericalCentroid(pacific.map(point)).longitude).toBeCloseTo(179.7710547323989, 10);
		expect(sphericalCentroid(pacific.map(point)).latitude).toBeCloseTo(-7.994876601142929, 10);
	});

	it('refuses places that balance around the Earth', () => {
		const around = [0, 90, 180, 270].map((longitude) => ({ latitude: 0, longitude }));
		expect(() => sphericalCentroid(around)).toThrow('Give one place for the species');
	});
});

describe('greatCircleDistances', () => {
	it('goes through the lower triangle row by row', () => {
		const [a, b, c] = [point([0, 0]), point([1, 0]), point([0, 2])];
		expect([...greatCircleDistances([a, b, c])]).toEqual([greatCircleKm(b, a), greatCircleKm(c, a), greatCircleKm(c, b)]);
	});
});
