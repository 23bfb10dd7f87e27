import type { Tree } from './tree.ts';

const EN_DASH = '–';

/**
 * Name of a clade by its span: its first and last tip in tree order, as "rufula–tumida". Only the epithets are used when
 * all tips of the tree share one genus. A tip is named by itself.
 */
export function spanName(tree: Tree, node: number): string {
	return spanOf(tree, node, lastInClade(tree, node), sharedGenus(tree));
}

/** `spanName` of every node; linear in the nodes. */
export function spanNames(tree: Tree): string[] {
	const genus = sharedGenus(tree);
	const last = Int32Array.from(tree.parent, (_, node) => node);
	for (let node = last.length - 1; node > 0; node--) {
		const above = tree.parent[node] ?? 0;
		last[above] = Math.max(last[above] ?? 0, last[node] ?? 0);
	}
	const first = Int32Array.from(tree.parent, (_, node) => node);
	for (let node = first.length - 1; node >= 0; node--) if (tree.childCount[node] !== 0) first[node] = first[node + 1] ?? node;
	return tree.label.map((_, node) => joined(tree, first[node] ?? node, last[node] ?? node, genus));
}

function spanOf(tree: Tree, node: number, last: number, genus: string): string {
	let first = node;
	while ((tree.childCount[first] ?? 0) > 0) first += 1;
	return joined(tree, first, last, genus);
}

function joined(tree: Tree, first: number, last: number, genus: string): string {
	const from = (tree.label[first] ?? '').slice(genus.length);
	const to = (tree.label[last] ?? '').slice(genus.length);
	return first === last ? from : `${from}${EN_DASH}${to}`;
}

/** In preorder a clade is one run of nodes and ends with a tip. */
function lastInClade(tree: Tree, node: number): number {
	let last = node;
	while (last + 1 < tree.parent.length && (tree.parent[last + 1] ?? -1) >= node) last += 1;
	return last;
}

/** The first word of every tip with the blank after it, or '' when they differ or a tip is a single word. */
function sharedGenus(tree: Tree): string {
	const labels = tree.label.filter((_, node) => tree.childCount[node] === 0);
	const one = labels[0] ?? '';
	const genus = one.slice(0, one.indexOf(' ') + 1);
	return labels.every((label) => label.startsWith(genus) && label.length > genus.length) ? genus : '';
}
