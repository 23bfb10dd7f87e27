import { isPlaceHeader } from '#lib/overlap/readPlaces.ts';
import { firstRows } from './firstRows.ts';

/**
 * Whether a table is more likely one of niche positions than a matrix: columns named by words that are no species of its
 * rows, numbers from the second column on, and not as many columns as rows. A guess by the first lines, which the person may turn round.
 */
export function looksLikeNiches(text: string): boolean {
	const [head = [], ...body] = firstRows(text);
	if (isPlaceHeader(head)) return false;
	const columns = head.slice(1).filter((cell) => cell !== '');
	if (columns.length === 0 || body.length < 2 || columns.some(isNumber)) return false;
	const names = new Set(body.map(([name = '']) => tidied(name)));
	if (columns.some((column) => names.has(tidied(column)))) return false;
	const isNumeric = body.every((cells) => cells.slice(1).every((cell) => cell === '' || isNumber(cell) || /^na$/i.test(cell)));
	return isNumeric && Math.abs(columns.length - body.length) > 1;
}

function isNumber(cell: string): boolean {
	return cell !== '' && Number.isFinite(Number(cell));
}

function tidied(name: string): string {
	return name.replaceAll('_', ' ').trim().toLowerCase();
}
