import { mean, sampleStandardDeviation } from 'simple-statistics';
import type { Study } from './study.ts';
import { csvText } from './tableText.ts';
import type { Terrain } from './terrain.ts';

const HEADER = ['species', 'temperature', 'temperature_se', 'rainfall', 'rainfall_se', 'temperature_breadth', 'records'] as const;

/**
 * Where the records of each species lie in climate: mean temperature (°C) and rainfall (mm) with the standard error of
 * the mean, the standard deviation of temperature as breadth, and the number of records.
 */
export function positionText({ accounts }: Study, { temperatureC, rainfallMm }: Terrain): string {
	const rows = accounts.map(({ niche, collection: { occurrences } }) => {
		const valuesOf = ({ values }: Terrain['temperatureC']) => occurrences.map(({ cell }) => values[cell] ?? Number.NaN);
		const [warmth, rain] = [valuesOf(temperatureC), valuesOf(rainfallMm)];
		const spread = sampleStandardDeviation(warmth);
		return [
			niche.species,
			mean(warmth).toFixed(2),
			(spread / Math.sqrt(warmth.length)).toFixed(3),
			mean(rain).toFixed(0),
			(sampleStandardDeviation(rain) / Math.sqrt(rain.length)).toFixed(1),
			spread.toFixed(2),
			String(occurrences.length)
		];
	});
	return csvText([HEADER, ...rows]);
}
