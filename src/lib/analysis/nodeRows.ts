import type { NodeRow } from '#lib/contracts/analysisResult.ts';
import type { NodeAverages } from '#lib/statistics/nodeAverages.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';

/** One row per internal node, with the species on each of its sides. */
export function nodeRows({ tree, ages, species }: PreparedAnalysis, averages: NodeAverages): NodeRow[] {
	const shape = treeShape({ parent: tree.parent, ages });
	return averages.nodes.map(({ node, age, nested, plain, pairs }) => ({
		node,
		age,
		nested,
		plain,
		pairs,
		children: (shape.children[node] ?? []).map((child) => species.slice(shape.tipFrom[child] ?? 0, shape.tipTo[child] ?? 0))
	}));
}
