import { latitudeOfRow, overLand, roundTo, type Grid, type GridFrame } from './grid.ts';
import { noiseField } from './noiseField.ts';
import { randomNumbers } from './randomNumbers.ts';

/** An invented land and its climates. */
export type Terrain = { readonly elevationM: Grid; readonly temperatureC: Grid; readonly rainfallMm: Grid };

export const TERRAIN_SEED = 4011;

/** 160 × 120 cells of 2.5′, placed in an empty stretch of ocean so that nobody takes it for a real place. */
export const MERROW_FRAME: GridFrame = { columns: 160, rows: 120, westDegrees: -150, southDegrees: 36, cellDegrees: 2.5 / 60 };

export const CLIMATE = {
	seaLevelC: 21,
	coolingPerKm: 6,
	coolingPerDegreeNorth: 0.9,
	rainfallMm: 1500,
	rainPerKm: 220,
	shadowPerKm: 700,
	rainPerDegreeNorth: -60,
	rainNoiseMm: 170,
	leastRainMm: 120
} as const;

const HIGHEST_M = 3000;
const SEA_LEVEL = 0.38; // height at which the coast runs; leaves about two fifths of the cells as land
const ROUGHNESS = 0.2;
const SHADOW_CELLS = 14; // how far a mountain dries the land east of it

/** Mountains of the Merrow Range: centre (column, row), length, breadth, height as a share, and the bearing in radians. */
const MOUNTAINS = [
	{ column: 28, row: 90, length: 17, breadth: 10, height: 0.95, bearing: -0.5 },
	{ column: 52, row: 74, length: 16, breadth: 11, height: 1, bearing: -0.7 },
	{ column: 78, row: 56, length: 15, breadth: 12, height: 0.9, bearing: -0.3 },
	{ column: 104, row: 40, length: 16, breadth: 11, height: 1, bearing: -0.6 },
	{ column: 132, row: 28, length: 14, breadth: 10, height: 0.85, bearing: -0.2 },
	{ column: 112, row: 82, length: 17, breadth: 10, height: 0.75, bearing: 0.6 },
	{ column: 138, row: 68, length: 12, breadth: 9, height: 0.7, bearing: 0.2 },
	{ column: 30, row: 36, length: 15, breadth: 10, height: 0.75, bearing: 0.4 },
	{ column: 62, row: 20, length: 12, breadth: 8, height: 0.65, bearing: 0 },
	{ column: 82, row: 102, length: 13, breadth: 8, height: 0.65, bearing: 0.1 }
] as const;

export function makeTerrain(): Terrain {
	const { columns, rows } = MERROW_FRAME;
	const roughness = noiseField(columns, rows, randomNumbers(TERRAIN_SEED, 'relief'));
	const wetness = noiseField(columns, rows, randomNumbers(TERRAIN_SEED, 'rain'));
	const relief = roughness.map((noise, cell) => mountainsAt(cell % columns, Math.floor(cell / columns)) + ROUGHNESS * noise);
	const heights = relief.map((height) => (height <= SEA_LEVEL ? Number.NaN : (height - SEA_LEVEL) * HIGHEST_M));
	const elevationM = overLand({ frame: MERROW_FRAME, values: heights }, (cell) => roundTo(heights[cell] ?? 0, 0));
	return { elevationM, temperatureC: temperatureOver(elevationM), rainfallMm: rainfallOver(elevationM, wetness) };
}

/** Height of the highest of the smooth mountains at a place, as a share. */
function mountainsAt(column: number, row: number): number {
	const heights = MOUNTAINS.map(({ length, breadth, height, bearing, ...summit }) => {
		const east = column - summit.column;
		const south = row - summit.row;
		const along = (east * Math.cos(bearing) + south * Math.sin(bearing)) / length;
		const aside = (south * Math.cos(bearing) - east * Math.sin(bearing)) / breadth;
		return height * Math.exp(-(along * along + aside * aside) / 2);
	});
	return Math.max(...heights);
}

function temperatureOver(elevationM: Grid): Grid {
	return overLand(elevationM, (cell, row) => {
		const north = latitudeOfRow(MERROW_FRAME, row) - MERROW_FRAME.southDegrees;
		const km = (elevationM.values[cell] ?? 0) / 1000;
		return roundTo(CLIMATE.seaLevelC - CLIMATE.coolingPerKm * km - CLIMATE.coolingPerDegreeNorth * north, 2);
	});
}

/** Rain comes from the west: more on high ground, less in the lee of higher ground, more in the north. */
function rainfallOver(elevationM: Grid, wetness: Float64Array): Grid {
	return overLand(elevationM, (cell, row, column) => {
		const north = latitudeOfRow(MERROW_FRAME, row) - MERROW_FRAME.southDegrees;
		const km = (elevationM.values[cell] ?? 0) / 1000;
		const upwind = elevationM.values.subarray(cell - Math.min(column, SHADOW_CELLS), cell);
		const barrierKm = upwind.reduce((highest, height) => (height > highest ? height : highest), 0) / 1000; // the sea, NaN, is never higher
		const rain =
			CLIMATE.rainfallMm +
			CLIMATE.rainPerKm * km +
			CLIMATE.rainPerDegreeNorth * (north - 2.5) -
			CLIMATE.shadowPerKm * Math.max(0, barrierKm - km) +
			CLIMATE.rainNoiseMm * (wetness[cell] ?? 0);
		return roundTo(Math.max(CLIMATE.leastRainMm, rain), 0);
	});
}
