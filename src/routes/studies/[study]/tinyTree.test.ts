import { describe, expect, it } from 'vitest';
import { tinyTree } from './tinyTree.ts';

describe('tinyTree', () => {
	// By hand: ((a,b),c) with ages 2 (root), 1, 0, 0, 0. Rows of 56 / 3 units; the inner node lies half-way to the root,
	// at 120 of 240, between rows 9.3 and 28; the root at 240 between 18.7 and 46.7.
	it('puts nodes at their age and tips on even rows', () => {
		const path = tinyTree({ parent: [-1, 0, 1, 1, 0], age: [2, 1, 0, 0, 0] });
		expect(path).toContain('M120 9.3V28');
		expect(path).toContain('M240 18.7V46.7');
		expect(path).toContain('M120 18.7H240');
		expect(path).toContain('M0 46.7H240');
	});

	// By property: every node but the root has one branch, every inner node one bar.
	it('draws one branch for each node and one bar for each split', () => {
		const path = tinyTree({ parent: [-1, 0, 1, 1, 0, 4, 4], age: [5, 3, 0, 0, 2, 0, 0] });
		expect(path.match(/H/g)).toHaveLength(6);
		expect(path.match(/V/g)).toHaveLength(3);
	});

	it('draws a tree as deep as it has tips', () => {
		// A caterpillar of 20,000 tips: node 2k is the k-th split, node 2k + 1 its tip.
		const n = 20_000;
		const parent = Array.from({ length: 2 * n - 1 }, (_, i) => (i === 0 ? -1 : i % 2 === 1 ? i - 1 : i - 2));
		const age = parent.map((_, i) => (i % 2 === 1 || i === 2 * n - 2 ? 0 : n - i / 2));
		expect(tinyTree({ parent, age }).match(/V/g)).toHaveLength(n - 1);
	});
});
