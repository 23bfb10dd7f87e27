import { InputError } from '#lib/remarks/inputError.ts';
import type { Tree } from './tree.ts';

const BRANCH_PREFIX = 'branch:';

/**
 * The tree of some of its tips, in tree order. Branches that lose their split are joined and their lengths summed; no node
 * with a single child remains, and the root becomes the deepest node that still branches, so every MRCA age of an
 * ultrametric tree stays as it was. Annotations of a branch that was joined are left out, for they spoke of a part of it.
 *
 * @param keepTipIndices - node indices of the tips to keep, in any order
 * @throws {InputError} `too-few-tips` when fewer than 2 tips are kept; `not-a-tip` when an index is not a tip's
 */
export function pruneTree(tree: Tree, keepTipIndices: readonly number[]): Tree {
	const liveChildren = countLiveChildren(tree, keepTipIndices);
	const kept: number[] = [];
	const newIndex = new Int32Array(tree.parent.length).fill(-1);
	const parent: number[] = [];
	const length: number[] = [];
	const isJoined: boolean[] = [];
	// for every node: nearest kept node at or above it, and the summed length from there down to it
	const anchor = new Int32Array(tree.parent.length).fill(-1);
	const below = new Float64Array(tree.parent.length);
	for (let node = 0; node < tree.parent.length; node++) {
		const live = liveChildren[node] ?? 0;
		if (live === 0) continue;
		const above = tree.parent[node] ?? -1;
		const from = above < 0 ? -1 : (anchor[above] ?? -1);
		const sum = from < 0 ? 0 : (below[above] ?? 0) + (tree.length[node] ?? NaN);
		const isKept = tree.childCount[node] === 0 || live > 1;
		anchor[node] = isKept ? kept.length : from;
		below[node] = isKept ? 0 : sum;
		if (!isKept) continue;
		newIndex[node] = kept.length;
		kept.push(node);
		parent.push(from);
		length.push(sum);
		isJoined.push(above < 0 || newIndex[above] === -1);
	}
	return rebuilt(tree, kept, { parent, length, isJoined });
}

/** For every node, how many of its children lead to a kept tip; 1 for a kept tip itself. */
function countLiveChildren(tree: Tree, keepTipIndices: readonly number[]): Int32Array {
	const live = new Int32Array(tree.parent.length);
	for (const tip of keepTipIndices) {
		if (tree.childCount[tip] !== 0) throw new InputError('not-a-tip', `Expected the index of a tip to keep; got ${tip}.`);
		live[tip] = 1;
	}
	const tipCount = new Set(keepTipIndices).size;
	if (tipCount < 2) throw new InputError('too-few-tips', `Expected at least 2 tips to keep; got ${tipCount}. Keep more species.`);
	for (let node = tree.parent.length - 1; node > 0; node--) {
		const above = tree.parent[node] ?? 0;
		if ((live[node] ?? 0) > 0) live[above] = (live[above] ?? 0) + 1;
	}
	return live;
}

type Joined = { readonly parent: readonly number[]; readonly length: readonly number[]; readonly isJoined: readonly boolean[] };

function rebuilt(tree: Tree, kept: readonly number[], { parent, length, isJoined }: Joined): Tree {
	const childCount = new Int32Array(kept.length);
	for (const above of parent) if (above >= 0) childCount[above] = (childCount[above] ?? 0) + 1;
	const annotations = new Map<number, Readonly<Record<string, string>>>();
	for (const [index, node] of kept.entries()) {
		const known = tree.annotations.get(node);
		if (known === undefined) continue;
		const entries = Object.entries(known).filter(([key]) => isJoined[index] !== true || !key.startsWith(BRANCH_PREFIX));
		if (entries.length > 0) annotations.set(index, Object.fromEntries(entries));
	}
	return {
		parent: Int32Array.from(parent),
		length: Float64Array.from(length),
		childCount,
		label: kept.map((node) => tree.label[node] ?? ''),
		labelRaw: kept.map((node) => tree.labelRaw[node] ?? ''),
		annotations
	};
}
