import type { Findings } from './findingsView.ts';

/** Internal nodes with the plain mean across each. */
export function nodeMeansOf({ nodeAverages, plate }: Pick<Findings, 'nodeAverages' | 'plate'>): { age: number; mean: number }[] {
	return nodeAverages.nodes.map(({ node, plain }) => ({ age: plate.tree.age[node] ?? 0, mean: plain }));
}
