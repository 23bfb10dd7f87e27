import { landCells, latitudeOfRow, longitudeOfColumn, roundTo, type Grid } from './grid.ts';
import type { RandomNumbers } from './randomNumbers.ts';

/** Where a species could have got to: chance falls as a Gaussian of the distance from a home, in degrees. */
type Reach = { readonly latitude: number; readonly longitude: number; readonly radiusDegrees: number };

export type Occurrence = { readonly cell: number; readonly latitude: number; readonly longitude: number };

export type CollectingPlan = {
	readonly fewest: number;
	readonly most: number;
	/** smallest and largest radius of a reach, in degrees */
	readonly radiusDegrees: readonly [number, number];
};

export type Collection = { readonly reach: Reach; readonly occurrences: readonly Occurrence[] };

const COORDINATE_DECIMALS = 4;

/** Records of one species, drawn cell by cell in proportion to suitability times reach, each at a random place in its cell. */
export function collect(map: Grid, plan: CollectingPlan, random: RandomNumbers): Collection {
	const cells = landCells(map);
	const suitability = cells.map((cell) => map.values[cell] ?? 0);
	const home = placeIn(map, drawCell(cells, suitability, random), random);
	const [nearest, farthest] = plan.radiusDegrees;
	const reach: Reach = {
		latitude: home.latitude,
		longitude: home.longitude,
		radiusDegrees: roundTo(nearest + (farthest - nearest) * random.uniform(), 2)
	};
	const chances = cells.map((cell, index) => (suitability[index] ?? 0) * reachAt(map, cell, reach));
	const count = plan.fewest + random.index(plan.most - plan.fewest + 1);
	const occurrences = Array.from({ length: count }, () => placeIn(map, drawCell(cells, chances, random), random));
	return { reach, occurrences };
}

function reachAt(map: Grid, cell: number, reach: Reach): number {
	const north = latitudeOfRow(map.frame, Math.floor(cell / map.frame.columns)) - reach.latitude;
	const degreesEast = longitudeOfColumn(map.frame, cell % map.frame.columns) - reach.longitude;
	const east = degreesEast * Math.cos((reach.latitude * Math.PI) / 180);
	return Math.exp(-(north * north + east * east) / (2 * reach.radiusDegrees * reach.radiusDegrees));
}

function drawCell(cells: readonly number[], chances: readonly number[], random: RandomNumbers): number {
	let left = random.uniform() * chances.reduce((sum, chance) => sum + chance, 0);
	for (const [index, cell] of cells.entries()) {
		left -= chances[index] ?? 0;
		if (left < 0) return cell;
	}
	return cells[cells.length - 1] ?? 0;
}

/** Kept a twentieth of a cell from its edges, so that rounding never moves a record across the coast. */
function placeIn(map: Grid, cell: number, random: RandomNumbers): Occurrence {
	const offset = (): number => (random.uniform() - 0.5) * 0.9 * map.frame.cellDegrees;
	const latitude = latitudeOfRow(map.frame, Math.floor(cell / map.frame.columns)) + offset();
	const longitude = longitudeOfColumn(map.frame, cell % map.frame.columns) + offset();
	return { cell, latitude: roundTo(latitude, COORDINATE_DECIMALS), longitude: roundTo(longitude, COORDINATE_DECIMALS) };
}
