import { InputError } from '#lib/remarks/inputError.ts';

/** Degrees: latitude in [−90, 90], longitude in [−180, 360). */
export type GeographicPoint = { readonly latitude: number; readonly longitude: number };

/** Mean radius of the Earth, km, of the GRS 80 ellipsoid. @see Moritz (2000), doi:10.1007/s001900050278 */
export const EARTH_RADIUS_KM = 6371.0088;

/** Below this length of the mean vector (unit: radii) the points look in no common direction. */
const NO_DIRECTION = 1e-9;

/**
 * Great-circle distance on a sphere of the Earth's mean radius; up to 0.6 % from the ellipsoid. The haversine form keeps
 * metres apart and, with the clamp, antipodes too.
 *
 * @returns km, in [0, π R]
 * @see Sinnott (1984) Sky and Telescope 68:159
 */
export function greatCircleKm(a: GeographicPoint, b: GeographicPoint): number {
	const halfLatitude = radians(b.latitude - a.latitude) / 2;
	const halfLongitude = radians(b.longitude - a.longitude) / 2;
	const haversine =
		Math.sin(halfLatitude) ** 2 + Math.cos(radians(a.latitude)) * Math.cos(radians(b.latitude)) * Math.sin(halfLongitude) ** 2;
	return 2 * EARTH_RADIUS_KM * Math.asin(Math.sqrt(Math.min(1, haversine)));
}

/**
 * The middle of some points on the sphere: the direction of the sum of their unit vectors, so the date line is no edge.
 * @throws {InputError} `no-centroid` when the points balance around the Earth
 */
export function sphericalCentroid(points: readonly GeographicPoint[]): GeographicPoint {
	let [x, y, z] = [0, 0, 0];
	for (const { latitude, longitude } of points) {
		x += Math.cos(radians(latitude)) * Math.cos(radians(longitude));
		y += Math.cos(radians(latitude)) * Math.sin(radians(longitude));
		z += Math.sin(radians(latitude));
	}
	if (Math.hypot(x, y, z) <= NO_DIRECTION * points.length) {
		throw new InputError(
			'no-centroid',
			`Expected places with a middle; these ${points.length} lie all around the Earth. Give one place for the species.`
		);
	}
	return { latitude: degrees(Math.atan2(z, Math.hypot(x, y))), longitude: degrees(Math.atan2(y, x)) };
}

/** Distances of all pairs of points, km: the strict lower triangle, row by row. */
export function greatCircleDistances(points: readonly GeographicPoint[]): Float64Array {
	const lower = new Float64Array((points.length * (points.length - 1)) / 2);
	let pair = 0;
	for (const [i, a] of points.entries()) for (const b of points.slice(0, i)) lower[pair++] = greatCircleKm(a, b);
	return lower;
}

function radians(angle: number): number {
	return (angle * Math.PI) / 180;
}

function degrees(angle: number): number {
	return (angle * 180) / Math.PI;
}
