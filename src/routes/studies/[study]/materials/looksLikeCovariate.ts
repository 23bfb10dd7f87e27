import { isPlaceHeader } from '#lib/overlap/readPlaces.ts';
import { firstRows } from './firstRows.ts';

/** Above this a value is no overlap, not even in per cent. */
const FULL_PERCENT = 100;

/**
 * Whether a table is more likely a covariate than overlaps: a table of places, values beyond any overlap, or distances that
 * go above 1 (a diagonal of 0, or a header that says so). A guess by the first lines, which the person may turn round.
 */
export function looksLikeCovariate(text: string): boolean {
	const [head = [], ...body] = firstRows(text);
	if (isPlaceHeader(head)) return true;
	const values = body
		.flatMap((cells) => cells.slice(1))
		.filter((cell) => cell !== '')
		.map(Number);
	const largest = values.reduce((most, value) => (value > most ? value : most), 0);
	if (largest > FULL_PERCENT) return true;
	return largest > 1 && (isHollow(body) || head.some((cell) => /distance|\bkm\b/i.test(cell)));
}

/** Row k, after its name, holds 0 in its own column. */
function isHollow(body: readonly (readonly string[])[]): boolean {
	return body.length >= 2 && body.every((cells, row) => cells[row + 1] !== undefined && Number(cells[row + 1] || 'x') === 0);
}
