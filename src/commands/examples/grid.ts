/** Where the cells of a map lie. Row 0 is the northern edge; a cell is a square of `cellDegrees`; west and south are outer edges. */
export type GridFrame = {
	readonly columns: number;
	readonly rows: number;
	readonly westDegrees: number;
	readonly southDegrees: number;
	readonly cellDegrees: number;
};

/** A frame with one value a cell, row by row from the north-west; NaN at sea. */
export type Grid = { readonly frame: GridFrame; readonly values: Float64Array };

export function latitudeOfRow(frame: GridFrame, row: number): number {
	return frame.southDegrees + (frame.rows - row - 0.5) * frame.cellDegrees;
}

export function longitudeOfColumn(frame: GridFrame, column: number): number {
	return frame.westDegrees + (column + 0.5) * frame.cellDegrees;
}

/** A grid whose value at each land cell is computed from the cell; the sea stays NaN. */
export function overLand(land: Grid, valueAt: (cell: number, row: number, column: number) => number): Grid {
	const { columns } = land.frame;
	const values = land.values.map((height, cell) =>
		Number.isNaN(height) ? Number.NaN : valueAt(cell, Math.floor(cell / columns), cell % columns)
	);
	return { frame: land.frame, values };
}

/** Indices of the cells that are land. */
export function landCells(grid: Grid): number[] {
	return [...grid.values.keys()].filter((cell) => !Number.isNaN(grid.values[cell]));
}

/** Rounding keeps the numbers in memory the numbers in the file. */
export function roundTo(value: number, decimals: number): number {
	return Number(value.toFixed(decimals));
}
