import type { AgedTree } from './agedTree.ts';
import { symmetricMatrix } from './pairValues.ts';
import { nextBelow, nextUint32, type RandomStream } from './randomStream.ts';

/**
 * Trees and matrices for tests and benchmarks: read from short Newick texts without quotes or comments, or drawn from a
 * stream. The product reads trees with the parser of `phylogeny`.
 */
export type ExampleTree = AgedTree & { readonly labels: readonly string[] };

type Branch = { readonly children: Branch[]; label: string; length: number };

/** Ages are the distance to the level of the highest tip. Labels are those of the tips, in tree order. */
export function exampleTree(newick: string): ExampleTree {
	const root: Branch = { children: [], label: '', length: 0 };
	const open: Branch[] = [root];
	let current = root;
	for (const [, bracket, label, length] of newick.matchAll(/([(),;])|([^(),:;]+)|:([^(),:;]+)/g)) {
		if (bracket === '(' || bracket === ',') {
			if (bracket === '(') open.push(current);
			current = { children: [], label: '', length: 0 };
			open.at(-1)?.children.push(current);
		} else if (bracket === ')') current = open.pop() ?? root;
		else if (label !== undefined) current.label = label;
		else if (length !== undefined) current.length = Number(length);
	}
	return flatten(root);
}

function flatten(root: Branch): ExampleTree {
	const parent: number[] = [];
	const depth: number[] = [];
	const labels: string[] = [];
	const visit = (branch: Branch, above: number): void => {
		const node = parent.length;
		parent.push(above);
		depth.push((depth[above] ?? 0) + branch.length);
		if (branch.children.length === 0) labels.push(branch.label);
		for (const child of branch.children) visit(child, node);
	};
	visit(root, -1);
	const height = Math.max(...depth);
	return { parent: Int32Array.from(parent), ages: Float64Array.from(depth, (d) => height - d), labels };
}

/** A tree of random shape: lineages join at rising ages, by pairs, or sometimes by threes when `polytomies`. */
export function drawnTree(tipCount: number, stream: RandomStream, { polytomies = false } = {}): AgedTree {
	type Lineage = { readonly children: readonly Lineage[]; readonly age: number };
	const lineages: Lineage[] = Array.from({ length: tipCount }, () => ({ children: [], age: 0 }));
	for (let age = 0; lineages.length > 1;) {
		age += (1 + nextBelow(stream, 1000)) / (500 * lineages.length);
		const joined = polytomies && lineages.length > 2 && nextBelow(stream, 3) === 0 ? 3 : 2;
		const children: Lineage[] = [];
		for (let k = 0; k < joined; k++) children.push(...lineages.splice(nextBelow(stream, lineages.length), 1));
		lineages.push({ children, age });
	}
	const parent: number[] = [];
	const ages: number[] = [];
	const waiting = lineages.map((lineage) => ({ lineage, above: -1 }));
	for (let next = waiting.pop(); next; next = waiting.pop()) {
		const above = parent.push(next.above) - 1;
		ages.push(next.lineage.age);
		for (const lineage of next.lineage.children) waiting.push({ lineage, above });
	}
	return { parent: Int32Array.from(parent), ages: Float64Array.from(ages) };
}

/** Overlaps of drawn pairs in [0, 1], rounded to some decimals so that ties occur, with 1 on the diagonal. */
export function drawnOverlap(count: number, stream: RandomStream, decimals = 2): Float64Array {
	const scale = 10 ** decimals;
	const lower = Array.from(
		{ length: (count * (count - 1)) / 2 },
		() => Math.round((nextUint32(stream) / 2 ** 32) * scale) / scale
	);
	return symmetricMatrix(lower, count, 1);
}

/** The age of the node where each pair meets, shape (n, n), by walking up from both tips: the slow way, to check others. */
export function pairAgeMatrix({ parent, ages }: AgedTree): Float64Array {
	const inner = new Set(parent);
	const tips = Array.from(parent.keys()).filter((node) => !inner.has(node));
	const lower = tips.flatMap((a, i) =>
		tips.slice(0, i).map((b) => {
			let [x, y] = [a, b];
			while (x !== y) [x, y] = x > y ? [parent[x] ?? 0, y] : [x, parent[y] ?? 0];
			return ages[x] ?? Number.NaN;
		})
	);
	return symmetricMatrix(lower, tips.length, 0);
}
