import { type Grid } from './grid.ts';

const NO_DATA = -9999;
const OVERLAP_DECIMALS = 6;

/** A full square of comma-separated values, names with blanks, first row and first column. */
export function squareText(
	species: readonly string[],
	values: readonly (readonly number[])[],
	decimals = OVERLAP_DECIMALS
): string {
	const rows = species.map((name, row) => [name, ...(values[row] ?? []).map((value) => String(Number(value.toFixed(decimals))))]);
	return csvText([['species', ...species], ...rows]);
}

/** Rows as comma-separated values; no cell of the examples needs quotes. */
export function csvText(rows: readonly (readonly string[])[]): string {
	return rows.map((row) => `${row.join(',')}\n`).join('');
}

/** An ASCII raster grid, northern row first, the sea as no data. */
export function gridText({ frame, values }: Grid): string {
	const header = [
		`ncols ${frame.columns}`,
		`nrows ${frame.rows}`,
		`xllcorner ${frame.westDegrees}`,
		`yllcorner ${frame.southDegrees}`,
		`cellsize ${frame.cellDegrees.toFixed(12)}`,
		`NODATA_value ${NO_DATA}`
	];
	const rows = Array.from({ length: frame.rows }, (_, row) =>
		Array.from(values.subarray(row * frame.columns, (row + 1) * frame.columns), (value) =>
			String(Number.isNaN(value) ? NO_DATA : value)
		).join(' ')
	);
	return `${[...header, ...rows].join('\n')}\n`;
}
