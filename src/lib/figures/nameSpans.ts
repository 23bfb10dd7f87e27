import type { PlateModel, PlateNode } from './plateModel.ts';

/** A clade named in place of its rows. */
export type NameSpan = { readonly node: number; readonly from: number; readonly to: number };

/**
 * Clades to name where single names would be too small: from the root down, a clade is named whole once it is no larger
 * than `mostRows`; one with fewer rows than `leastRows` has no room for a line of type and stays unnamed.
 */
export function nameSpans(model: PlateModel, leastRows: number, mostRows: number): NameSpan[] {
	const byIndex = new Map(model.nodes.map((node) => [node.node, node]));
	const spans: NameSpan[] = [];
	const open: PlateNode[] = [];
	const root = model.nodes[0];
	if (root) open.push(root);
	for (let node = open.pop(); node; node = open.pop()) {
		const { from, to } = node;
		if (to - from < leastRows) continue;
		const below = node.daughters
			.flatMap((child) => byIndex.get(child) ?? [])
			.filter((child) => child.to - child.from >= leastRows);
		if (to - from <= mostRows || below.length === 0) spans.push({ node: node.node, from, to });
		else open.push(...below);
	}
	return spans.sort((a, b) => a.from - b.from);
}
