import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { cellNumber, decimalOf } from './cellNumber.ts';
import { cellAt, rowCells, rowCount, type CellTable } from './cellTable.ts';
import { refuseTooFew, refuseTooMany } from './matrixEntries.ts';
import type { Decimal, Separator } from './matrixReading.ts';
import { plainName } from './plainName.ts';
import { readCells } from './readCells.ts';
import { readText } from './readText.ts';

const HEADERS = {
	species: /^(species|taxon|name|tip|scientific[\s_.-]?name)$/i,
	latitude: /^(lat|latitude|decimal[\s_.-]?latitude|y)([\s_.-]?(deg|degrees|\(°\)))?$/i,
	longitude: /^(lon|lng|long|longitude|decimal[\s_.-]?longitude|x)([\s_.-]?(deg|degrees|\(°\)))?$/i
};

/** Where species live: one place a row. A species with several rows has several places. */
export type Places = {
	/** in the order of their first rows */
	readonly species: readonly string[];
	/** decimal degrees, one list a species */
	readonly points: readonly (readonly { readonly latitude: number; readonly longitude: number }[])[];
	readonly separator: Separator;
	readonly remarks: readonly Remark[];
};

/** Whether a first line names the three columns of a table of places. */
export function isPlaceHeader(cells: readonly string[]): boolean {
	return Object.values(HEADERS).every((pattern) => cells.some((cell) => pattern.test(cell)));
}

/**
 * Reads a table with the columns species, latitude and longitude, found by their names; other columns are left aside.
 *
 * @throws {InputError} `no-place-columns` names what is missing; `bad-coordinate` with line and column for what is no
 * number or no place on the Earth; `unnamed-species`, `too-few-species`, `too-many-species`; those of `readText`, `readCells`
 */
export function readPlaces(source: string | Uint8Array): Places {
	const decoded = readText(source);
	const table = readCells(decoded.text);
	const columns = placeColumns(table);
	const decimal = decimalOfPlaces(table, columns);
	const placesOf = new Map<string, { latitude: number; longitude: number }[]>();
	for (let row = 1; row < rowCount(table); row++) {
		const name = plainName(cellAt(table, row, columns.species));
		if (name === '') throw unnamed(table, row, columns.species);
		const latitude = coordinate(table, row, { column: columns.latitude, decimal, limits: LATITUDE });
		const longitude = coordinate(table, row, { column: columns.longitude, decimal, limits: LONGITUDE });
		const known = placesOf.get(name) ?? [];
		known.push({ latitude, longitude });
		placesOf.set(name, known);
	}
	const species = [...placesOf.keys()];
	refuseTooFew(species);
	refuseTooMany(species.length);
	const points = [...placesOf.values()];
	return { species, points, separator: table.separator, remarks: [...decoded.remarks, ...severalPlaces(points)] };
}

type Columns = { readonly species: number; readonly latitude: number; readonly longitude: number };

function placeColumns(table: CellTable): Columns {
	const head = rowCells(table, 0);
	const find = (pattern: RegExp) => head.findIndex((cell) => pattern.test(cell));
	const columns = { species: find(HEADERS.species), latitude: find(HEADERS.latitude), longitude: find(HEADERS.longitude) };
	const missing = Object.entries(columns).flatMap(([name, at]) => (at === -1 ? [name] : []));
	if (missing.length === 0) return columns;
	const message = `Expected a first line that names the columns species, latitude and longitude; ${missing.join(' and ')} ${missing.length === 1 ? 'is' : 'are'} not there. Name the columns so.`;
	throw new InputError('no-place-columns', message, { line: table.lines[0] ?? 1 });
}

function decimalOfPlaces(table: CellTable, { latitude, longitude }: Columns): Decimal {
	if (table.separator === ',') return '.';
	const rows = Math.max(0, rowCount(table) - 1);
	return decimalOf(2 * rows, (k) => cellAt(table, 1 + (k >> 1), k % 2 === 0 ? latitude : longitude));
}

type Limits = { readonly what: string; readonly from: number; readonly to: number };
const LATITUDE: Limits = { what: 'a latitude', from: -90, to: 90 };
const LONGITUDE: Limits = { what: 'a longitude', from: -180, to: 360 };

type Coordinate = { readonly column: number; readonly decimal: Decimal; readonly limits: Limits };

function coordinate(table: CellTable, row: number, { column, decimal, limits }: Coordinate): number {
	const text = cellAt(table, row, column);
	const value = cellNumber(text, decimal);
	if (value >= limits.from && value <= limits.to) return value;
	const where = { line: table.lines[row] ?? 0, column: column + 1 };
	const message = `Line ${where.line}, column ${where.column}: expected ${limits.what} in decimal degrees from ${limits.from} to ${limits.to}; got “${text}”.`;
	throw new InputError('bad-coordinate', message, where);
}

function unnamed(table: CellTable, row: number, column: number): InputError {
	const where = { line: table.lines[row] ?? 0, column: column + 1 };
	const message = `Line ${where.line}, column ${where.column}: expected a species name; the cell is empty.`;
	return new InputError('unnamed-species', message, where);
}

function severalPlaces(points: Places['points']): Remark[] {
	const several = points.filter((places) => places.length > 1).length;
	if (several === 0) return [];
	const message = `${several.toLocaleString('en')} species ${several === 1 ? 'has' : 'have'} more than one row; the middle of the rows on the sphere is used, each row counted alike.`;
	return [remark('information', 'several-places', message)];
}
