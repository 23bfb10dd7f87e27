import type { Study } from './study.ts';
import { csvText } from './tableText.ts';
import type { Terrain } from './terrain.ts';

const HEADER = [
	'occurrenceID',
	'basisOfRecord',
	'scientificName',
	'decimalLatitude',
	'decimalLongitude',
	'geodeticDatum',
	'temperature',
	'rainfall'
] as const;
const COORDINATE_DECIMALS = 4;
const ID_DIGITS = 4;

/** Records of all species under their Darwin Core names, with temperature (°C) and yearly rainfall (mm) of the cell they lie in. */
export function recordText(study: Study, terrain: Terrain, collectionCode: string): string {
	const rows = study.accounts.flatMap(({ niche, collection }) =>
		collection.occurrences.map(({ cell, latitude, longitude }) => [
			'HumanObservation',
			niche.species,
			latitude.toFixed(COORDINATE_DECIMALS),
			longitude.toFixed(COORDINATE_DECIMALS),
			'WGS84',
			String(terrain.temperatureC.values[cell]),
			String(terrain.rainfallMm.values[cell])
		])
	);
	const numbered = rows.map((row, index) => [`${collectionCode}-${String(index + 1).padStart(ID_DIGITS, '0')}`, ...row]);
	return csvText([HEADER, ...numbered]);
}
