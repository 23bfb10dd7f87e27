import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { csvLine } from './csv.ts';

/** @yields lines of CSV: one internal node of the pruned tree a line, in preorder */
export function* nodeLines({ nodeAverages }: Pick<AnalysisResult, 'nodeAverages'>): Generator<string> {
	yield csvLine(['node', 'age', 'tips', 'pairs', 'nested', 'plain']);
	for (const { node, age, children, pairs, nested, plain } of nodeAverages.nodes) {
		const tips = children.reduce((sum, side) => sum + side.length, 0);
		yield csvLine([node, age, tips, pairs, nested, plain]);
	}
}
