import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { ageRows } from './ageRows.ts';
import { csvLine } from './csv.ts';

/**
 * Every pair of the analysis once, in the order of the tree.
 * @yields lines of CSV: species_a, species_b, age (unit of the tree set), overlap (as imported)
 */
export function* pairLines({ plate }: Pick<AnalysisResult, 'plate'>): Generator<string> {
	yield csvLine(['species_a', 'species_b', 'age', 'overlap']);
	const { species, overlapLower } = plate;
	let row = 0;
	for (const ages of ageRows(plate.tree)) {
		const start = (row * (row - 1)) / 2;
		for (let other = 0; other < row; other++) {
			yield csvLine([
				species[other] ?? '',
				species[row] ?? '',
				ages[other] ?? Number.NaN,
				overlapLower[start + other] ?? Number.NaN
			]);
		}
		row += 1;
	}
}
