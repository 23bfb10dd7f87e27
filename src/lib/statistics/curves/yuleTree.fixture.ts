import type { AgedTree } from '../agedTree.ts';
import { nextBelow, nextUniform, type RandomStream } from '../randomStream.ts';

/**
 * A pure-birth tree of n tips and root age 1: looking back, n lineages join by random pairs, the wait while there are j
 * of them exponential with rate j. Simulated designs of the methods use it.
 */
export function yuleTree(tipCount: number, stream: RandomStream): AgedTree {
	type Lineage = { readonly children: readonly Lineage[]; readonly age: number };
	const lineages: Lineage[] = Array.from({ length: tipCount }, () => ({ children: [], age: 0 }));
	let age = 0;
	while (lineages.length > 1) {
		age -= Math.log(nextUniform(stream)) / lineages.length;
		const children = [0, 1].flatMap(() => lineages.splice(nextBelow(stream, lineages.length), 1));
		lineages.push({ children, age });
	}
	const parent: number[] = [];
	const ages: number[] = [];
	const waiting = lineages.map((lineage) => ({ lineage, above: -1 }));
	for (let next = waiting.pop(); next; next = waiting.pop()) {
		const above = parent.push(next.above) - 1;
		ages.push(next.lineage.age / age);
		for (const lineage of next.lineage.children) waiting.push({ lineage, above });
	}
	return { parent: Int32Array.from(parent), ages: Float64Array.from(ages) };
}
