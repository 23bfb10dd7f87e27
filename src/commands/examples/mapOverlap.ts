import { landCells, latitudeOfRow, type Grid } from './grid.ts';

export type MapOverlaps = { readonly d: readonly (readonly number[])[]; readonly i: readonly (readonly number[])[] };

/**
 * Schoener's D and Warren's I (as corrected in 2011) between all maps, over the land, cells weighted by the cosine of latitude.
 * Written apart from src/lib/overlap on purpose: the example matrices then check that room instead of repeating it.
 */
export function mapOverlaps(maps: readonly Grid[]): MapOverlaps {
	const shares = maps.map(areaShares);
	const between = (measure: (p: Float64Array, q: Float64Array) => number): number[][] =>
		shares.map((p, row) => shares.map((q, column) => (row === column ? 1 : measure(p, q))));
	return { d: between(sharedMass), i: between(affinity) };
}

/** Each land cell's share of the map's suitability, as intensity times area. */
function areaShares(map: Grid): Float64Array {
	const weighted = landCells(map).map((cell) => {
		const latitude = latitudeOfRow(map.frame, Math.floor(cell / map.frame.columns));
		return (map.values[cell] ?? 0) * Math.cos((latitude * Math.PI) / 180);
	});
	const total = weighted.reduce((sum, value) => sum + value, 0);
	return Float64Array.from(weighted, (value) => value / total);
}

function sharedMass(p: Float64Array, q: Float64Array): number {
	return p.reduce((sum, share, cell) => sum + Math.min(share, q[cell] ?? 0), 0);
}

function affinity(p: Float64Array, q: Float64Array): number {
	return p.reduce((sum, share, cell) => sum + Math.sqrt(share * (q[cell] ?? 0)), 0);
}
