import { pairValue, type PairMatrix } from './pairMatrix.ts';
import { safeName } from './plainName.ts';

/**
 * The matrix as a full square in CSV (RFC 4180, LF): names in the first row and column in the order of the matrix, 1 on
 * the diagonal, an empty cell where a pair is missing. Numbers read back to the same double.
 */
export function writeMatrixCsv(matrix: PairMatrix): string {
	const names = matrix.species.map(nameCell);
	const rows = names.map((name, i) => [name, ...names.map((_, j) => numberCell(pairValue(matrix, i, j)))].join(','));
	return `${['species', ...names].join(',')}\n${rows.join('\n')}\n`;
}

/**
 * The matrix as a list of pairs in CSV: `species_a, species_b, overlap`, each pair once, `species_a` before `species_b` in
 * the order of the matrix. A missing pair keeps its row with an empty overlap.
 */
export function writePairList(matrix: PairMatrix): string {
	const names = matrix.species.map(nameCell);
	const lines = ['species_a,species_b,overlap'];
	for (let i = 0; i < names.length; i++) {
		for (let j = i + 1; j < names.length; j++)
			lines.push(`${names[i] ?? ''},${names[j] ?? ''},${numberCell(pairValue(matrix, i, j))}`);
	}
	return `${lines.join('\n')}\n`;
}

function numberCell(value: number): string {
	return Number.isNaN(value) ? '' : String(value);
}

function nameCell(name: string): string {
	const safe = safeName(name);
	return /[",;\t\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
