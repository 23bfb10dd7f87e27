import { labelSpelling } from './label.ts';
import type { Tree } from './tree.ts';

/**
 * A tree as one line of Newick text with its semicolon. Labels keep their spelling when it is standard and are quoted when
 * they have to be; lengths are written so that they read back as the same double, and left out where they are missing and
 * at the root. Annotations are not written.
 */
export function writeNewick(tree: Tree): string {
	const parts: string[] = [];
	const open: number[] = [];
	for (let node = 0; node < tree.parent.length; node++) {
		const above = tree.parent[node] ?? -1;
		for (let last = open.at(-1); last !== undefined && last !== above; last = open.at(-1)) {
			parts.push(')', ending(tree, last));
			open.pop();
		}
		const isFirstChild = node === above + 1; // true of the root too
		if (!isFirstChild) parts.push(',');
		if ((tree.childCount[node] ?? 0) > 0) {
			parts.push('(');
			open.push(node);
		} else parts.push(ending(tree, node));
	}
	for (let last = open.pop(); last !== undefined; last = open.pop()) parts.push(')', ending(tree, last));
	return `${parts.join('')};`;
}

function ending(tree: Tree, node: number): string {
	const label = labelSpelling(tree.label[node] ?? '', tree.labelRaw[node] ?? '');
	const length = tree.length[node] ?? NaN;
	return node === 0 || Number.isNaN(length) ? label : `${label}:${length}`;
}
