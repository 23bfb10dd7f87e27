import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { writeCaption } from '#lib/analysis/words/caption.ts';

/** More digits are in the tables that can be downloaded; what is drawn needs no more. */
const DRAWN_DIGITS = 7;

/** The part of a result that its page shows. Species on the sides of every node can be read off the tree, so they stay behind. */
export function findingsView(result: AnalysisResult) {
	const { nodeAverages, plate, ...rest } = result;
	const { nodes, nested, plain } = nodeAverages;
	return {
		...rest,
		nodeAverages: { nodes: nodes.map((row) => ({ node: row.node, nested: row.nested, plain: row.plain })), nested, plain },
		plate: { ...plate, overlapLower: plate.overlapLower.map(drawn), fanSlopes: plate.fanSlopes.map(drawn) },
		caption: writeCaption(result)
	};
}

export type Findings = ReturnType<typeof findingsView>;

function drawn(value: number): number {
	return Number(value.toPrecision(DRAWN_DIGITS));
}
