import { schoenersD, warrensI } from '#lib/overlap/measures.ts';
import { landCells, latitudeOfRow, type Grid } from './grid.ts';

export type MapOverlaps = { readonly d: readonly (readonly number[])[]; readonly i: readonly (readonly number[])[] };

/** Schoener's D and Warren's I between all maps, over the land, cells weighted by the cosine of latitude. */
export function mapOverlaps(maps: readonly Grid[]): MapOverlaps {
	const amounts = maps.map(amountsByArea);
	const between = (measure: typeof schoenersD): number[][] =>
		amounts.map((p, row) => amounts.map((q, column) => (row === column ? 1 : measure(p, q))));
	return { d: between(schoenersD), i: between(warrensI) };
}

/** Suitability times area: on longitude and latitude a cell shrinks towards the pole with the cosine of its latitude. */
function amountsByArea(map: Grid): Float64Array {
	return Float64Array.from(landCells(map), (cell) => {
		const latitude = latitudeOfRow(map.frame, Math.floor(cell / map.frame.columns));
		return (map.values[cell] ?? 0) * Math.cos((latitude * Math.PI) / 180);
	});
}
