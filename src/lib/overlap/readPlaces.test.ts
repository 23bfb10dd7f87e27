import { describe, expect, it } from 'vitest';
import { isPlaceHeader, readPlaces } from './readPlaces.ts';

describe('readPlaces', () => {
	it('finds the columns by their names, in any order and beside others', () => {
		const { species, points, remarks } = readPlaces('Longitude;note;Species;lat\n8,5;x;Alpha;-46,25\n179;y;Beta;0');
		expect(species).toEqual(['Alpha', 'Beta']);
		expect(points).toEqual([[{ latitude: -46.25, longitude: 8.5 }], [{ latitude: 0, longitude: 179 }]]);
		expect(remarks).toEqual([]);
	});

	it('gathers the rows of a species and says so', () => {
		const { species, points, remarks } = readPlaces('species,latitude,longitude\nAlpha,1,2\nBeta,3,4\nAlpha,5,6');
		expect(species).toEqual(['Alpha', 'Beta']);
		expect(points.map((places) => places.length)).toEqual([2, 1]);
		expect(remarks[0]).toMatchObject({ level: 'information', code: 'several-places' });
		expect(remarks[0]?.message).toContain('1 species has more than one row');
	});

	it('says which column is missing', () => {
		expect(() => readPlaces('species,latitude,elevation\nAlpha,1,2\nBeta,3,4')).toThrow('longitude is not there');
	});

	it.each([
		['91', 'Line 2, column 2: expected a latitude in decimal degrees from -90 to 90; got “91”.'],
		['12°30′', 'Line 2, column 2: expected a latitude in decimal degrees from -90 to 90; got “12°30′”.'],
		['', 'Line 2, column 2: expected a latitude in decimal degrees from -90 to 90; got “”.']
	])('names the cell that is no latitude: “%s”', (latitude, sentence) => {
		expect(() => readPlaces(`species,latitude,longitude\nAlpha,${latitude},2\nBeta,3,4`)).toThrow(sentence);
	});

	it('refuses a row without a name and a table of one species', () => {
		expect(() => readPlaces('species,latitude,longitude\n,1,2\nBeta,3,4')).toThrow('Line 2, column 1: expected a species name');
		expect(() => readPlaces('species,latitude,longitude\nAlpha,1,2\nAlpha,1,3')).toThrow('Expected at least 2 species; got 1.');
	});
});

describe('isPlaceHeader', () => {
	it('knows a table of places from a matrix', () => {
		expect(isPlaceHeader(['scientificName', 'decimalLatitude', 'decimalLongitude'])).toBe(true);
		expect(isPlaceHeader(['species', 'Alpha', 'Beta'])).toBe(false);
	});
});
