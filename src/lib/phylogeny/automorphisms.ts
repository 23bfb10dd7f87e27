import { assertFinite } from '#lib/remarks/assertFinite.ts';
import type { Tree } from './tree.ts';
import { SAME_AGE } from './treeShape.ts';

/** A count of relabellings: its natural logarithm, and the count itself where a double holds it exactly, else null. */
export type Automorphisms = { readonly log: number; readonly count: number | null };

/**
 * Number of relabellings of the tips that leave every MRCA age as it is, |Aut(T)|: the product, over the nodes, of m! for
 * each set of m children that are alike in shape and ages. A cherry gives 2, a polytomy of q tips q!. Nodes of one age on
 * top of each other (a branch of length 0) count as one polytomy, since the ages cannot tell them apart; ages closer than
 * 1e-9 of the oldest are one age. The ages of the tips themselves play no part.
 *
 * @param ages - shape (nodes,); as `nodeAges` gives them
 * @returns log in [0, ln n!]; count up to 2^53
 * @throws {InputError} `non-finite` on such an age
 *
 * Cost: O(n log n). Use: the smallest one-sided p that a permutation test can attain is |Aut(T)| / n!.
 */
export function automorphismLog(tree: Tree, ages: Float64Array): Automorphisms {
	const ageClass = ageClasses(tree, ages);
	const merged = mergedInto(tree, ageClass);
	const shapes = new Map<string, number>();
	const children: (number[] | undefined)[] = [];
	let log = 0;
	let count = 1;
	for (let node = tree.parent.length - 1; node >= 0; node--) {
		if (merged[node] !== node) continue;
		const below = (children[node] ?? []).sort((a, b) => a - b);
		for (const factor of orderings(below)) {
			log += Math.log(factor);
			count *= factor;
		}
		const key = tree.childCount[node] === 0 ? 'tip' : `${ageClass[node]}:${below.join()}`;
		const shape = shapes.get(key) ?? shapes.size;
		shapes.set(key, shape);
		children[node] = undefined; // its shape stands for it from here on
		const above = merged[tree.parent[node] ?? -1];
		if (above !== undefined) (children[above] ??= []).push(shape);
	}
	return { log, count: count <= Number.MAX_SAFE_INTEGER ? count : null };
}

/** The factors of m! for each run of m equal shapes in a sorted list. */
function orderings(sorted: readonly number[]): number[] {
	let run = 0;
	return sorted
		.map((shape, position) => {
			run = shape === sorted[position - 1] ? run + 1 : 1;
			return run;
		})
		.filter((factor) => factor > 1);
}

/** Numbers the distinct ages of inner nodes; sorting makes "the same age" one relation for all, whichever two are compared. */
function ageClasses(tree: Tree, ages: Float64Array): Int32Array {
	for (const [node, age] of ages.entries()) assertFinite(age, `ages[${node}]`);
	const inner = [...ages.keys()].filter((node) => tree.childCount[node] !== 0).sort((a, b) => (ages[a] ?? 0) - (ages[b] ?? 0));
	const tolerance = SAME_AGE * (ages[inner.at(-1) ?? 0] ?? 0);
	const classes = new Int32Array(ages.length).fill(-1);
	let current = 0;
	let last = ages[inner[0] ?? 0] ?? 0;
	for (const node of inner) {
		const age = ages[node] ?? 0;
		if (age - last > tolerance) current += 1;
		last = age;
		classes[node] = current;
	}
	return classes;
}

/** For every node the one it counts as: itself, or its ancestor when it has a single child or its ancestor's age. */
function mergedInto(tree: Tree, ageClass: Int32Array): Int32Array {
	const merged = Int32Array.from(tree.parent, (_, node) => node);
	for (let node = 1; node < merged.length; node++) {
		const above = merged[tree.parent[node] ?? 0] ?? 0;
		const isInner = tree.childCount[node] !== 0;
		if (isInner && (tree.childCount[node] === 1 || ageClass[node] === ageClass[above])) merged[node] = above;
	}
	return merged;
}
