import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { csvLine } from './csv.ts';

const HEADINGS = [
	...['node', 'clade', 'age', 'tips', 'mean_within', 'mean_between', 'difference', 'p', 'p_adjusted'],
	...['clade_above', 'p_beyond_parent', 'p_beyond_parent_adjusted', 'smallest_p', 'testable', 'marked', 'species']
];

/** @yields lines of CSV: one clade that the plan asked about a line; the headings alone where it asked about none */
export function* cladeLines({ clades = [], plate }: Pick<AnalysisResult, 'clades' | 'plate'>): Generator<string> {
	yield csvLine(HEADINGS);
	for (const row of clades) {
		yield csvLine([
			...[row.node, row.label, row.age, row.tips, row.meanWithin, row.meanBetween, row.difference, row.p, row.pAdjusted],
			...[row.parent?.label ?? null, row.pBeyondParent, row.pBeyondParentAdjusted, row.smallestP],
			...[yesOrNo(row.testable), yesOrNo(row.holds)],
			row.members.map((position) => plate.species[position] ?? '').join('; ')
		]);
	}
}

function yesOrNo(value: boolean): string {
	return value ? 'yes' : 'no';
}
