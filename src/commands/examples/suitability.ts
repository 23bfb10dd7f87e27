import { overLand, roundTo, type Grid } from './grid.ts';
import type { Niche } from './niches.ts';
import type { Terrain } from './terrain.ts';

/** Mean and standard deviation of a climate over the land, every cell counting once. */
export type ClimateScale = { readonly mean: number; readonly sd: number };
export type ClimateScales = { readonly temperatureC: ClimateScale; readonly rainfallMm: ClimateScale };

const MAP_DECIMALS = 4;

export function climateScales(terrain: Terrain): ClimateScales {
	return { temperatureC: scaleOf(terrain.temperatureC), rainfallMm: scaleOf(terrain.rainfallMm) };
}

function scaleOf(grid: Grid): ClimateScale {
	const values = grid.values.filter((value) => !Number.isNaN(value));
	const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
	const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
	return { mean, sd: Math.sqrt(variance) };
}

/** Suitability 0–1: a Gaussian response in each climate, multiplied. */
export function suitabilityMap(niche: Niche, terrain: Terrain, scales: ClimateScales): Grid {
	return overLand(terrain.elevationM, (cell) => {
		const temperature = standardised(terrain.temperatureC.values[cell] ?? 0, scales.temperatureC);
		const rainfall = standardised(terrain.rainfallMm.values[cell] ?? 0, scales.rainfallMm);
		const fromTemperature = (temperature - niche.centre[0]) / niche.width[0];
		const fromRainfall = (rainfall - niche.centre[1]) / niche.width[1];
		return roundTo(Math.exp(-(fromTemperature ** 2 + fromRainfall ** 2) / 2), MAP_DECIMALS);
	});
}

function standardised(value: number, scale: ClimateScale): number {
	return (value - scale.mean) / scale.sd;
}
