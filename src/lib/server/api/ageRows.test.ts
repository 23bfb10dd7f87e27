import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ageRows } from './ageRows.ts';

/** A random tree in preorder with ages that fall from the root; tips may have any age. */
const trees = fc.array(fc.nat({ max: 2 ** 30 }), { minLength: 1, maxLength: 40 }).map((draws) => {
	const parent = [-1];
	for (const draw of draws) {
		// in preorder the parent of the next node is the last node or one of its ancestors
		const path: number[] = [];
		for (let node = parent.length - 1; node >= 0; node = parent[node] ?? -1) path.push(node);
		parent.push(path[draw % path.length] ?? 0);
	}
	return { parent, age: parent.map((_, node) => 100 - node) };
});

function commonAncestor(parent: readonly number[], a: number, b: number): number {
	const above = new Set<number>();
	for (let node = a; node >= 0; node = parent[node] ?? -1) above.add(node);
	let node = b;
	while (!above.has(node)) node = parent[node] ?? -1;
	return node;
}

describe('ageRows', () => {
	it('gives the ages of a tree of three tips', () => {
		// by hand: ((A,B),C) with the pair at 1 and the root at 3
		const rows = [...ageRows({ parent: [-1, 0, 1, 1, 0], age: [3, 1, 0, 0, 0] })];
		expect(rows.map((row) => [...row])).toEqual([
			[0, 1, 3],
			[1, 0, 3],
			[3, 3, 0]
		]);
	});

	it('agrees with looking up every common ancestor', () => {
		fc.assert(
			fc.property(trees, ({ parent, age }) => {
				const tips = parent.map((_, node) => node).filter((node) => !parent.includes(node));
				const rows = [...ageRows({ parent, age })].map((row) => [...row]);
				const naive = tips.map((a) => tips.map((b) => (a === b ? 0 : (age[commonAncestor(parent, a, b)] ?? 0))));
				expect(rows).toEqual(naive);
			})
		);
	});
});
