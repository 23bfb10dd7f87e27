import type { Occurrence } from './occurrences.ts';

const EARTH_RADIUS_KM = 6371.0088; // mean radius of the ellipsoid WGS84

/** Great-circle distances in km between the mean positions of the species' records. */
export function homeDistances(collections: readonly (readonly Occurrence[])[]): number[][] {
	const homes = collections.map((occurrences) => ({
		latitude: meanOf(occurrences.map(({ latitude }) => latitude)),
		longitude: meanOf(occurrences.map(({ longitude }) => longitude))
	}));
	return homes.map((here) => homes.map((there) => greatCircleKm(here, there)));
}

type Position = { readonly latitude: number; readonly longitude: number };

/** Haversine form: exact for near points, where the cosine form loses its digits. */
function greatCircleKm(here: Position, there: Position): number {
	const radians = Math.PI / 180;
	const north = Math.sin(((there.latitude - here.latitude) * radians) / 2);
	const east = Math.sin(((there.longitude - here.longitude) * radians) / 2);
	const square = north * north + Math.cos(here.latitude * radians) * Math.cos(there.latitude * radians) * east * east;
	return 2 * EARTH_RADIUS_KM * Math.asin(Math.sqrt(square));
}

/** Plain means serve: no example crosses the date line. */
function meanOf(values: readonly number[]): number {
	return values.reduce((sum, value) => sum + value, 0) / values.length;
}
