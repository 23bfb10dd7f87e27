import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { drawnOverlap, drawnTree, exampleTree } from '../exampleTrees.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { randomStream } from '../randomStream.ts';
import { cladeContrast } from './cladeContrast.ts';
import { cladesOf, groupOf } from './cladeList.ts';
import { type CladeQuestion, testClades } from './testClades.ts';

const asked = { seed: 1, permutations: 999, alpha: 0.05 };

function ofTree(newick: string, overlap: Float64Array, minTips = 3): CladeQuestion {
	const tree = exampleTree(newick);
	return { ...asked, tree, overlap, groups: cladesOf(treeShape(tree), minTips) };
}

/** Overlap `inside` for pairs of one letter, `between` for the others. */
function blocks(letters: string, inside: number, between: number): Float64Array {
	const lower = [...letters].flatMap((a, i) => [...letters.slice(0, i)].map((b) => (a === b ? inside : between)));
	return symmetricMatrix(lower, letters.length, 1);
}

describe('testClades', () => {
	// By hand in exact fractions: only membership matters, and of the four ways to choose three of four species none
	// differs as much as A, B, C from D: 6 of 24 arrangements. With 4 ways no p can be below 1/4: not testable.
	it('has p = 6/24 for three of four species, and says that no p there could be small', () => {
		const { exact, count, clades } = testClades(
			ofTree('(((A:1,B:1):1,C:2):2,D:4);', symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1))
		);
		expect({ exact, count }).toEqual({ exact: true, count: 24 });
		expect(clades).toHaveLength(1);
		expect(clades[0]).toMatchObject({ p: 6 / 24, pAdjusted: 6 / 24, smallestP: 1 / 4, smallestAdjustedP: 1 / 4, holds: false });
		expect(clades[0]?.contrast.difference).toBeCloseTo(4 / 15, 14);
	});

	// By hand: .9 within both clades of three, .1 between: difference .8, which only the two halves reach: 2 of C(6, 3) = 20.
	it('has p = 2/C(n, n/2) for one of two halves that are alike inside', () => {
		const { clades } = testClades(ofTree('(((A:1,B:1):1,C:2):1,((D:1,E:1):1,F:2):1);', blocks('aaabbb', 0.9, 0.1)));
		expect(clades.map(({ p }) => p)).toEqual([2 / 20, 2 / 20]);
		for (const { contrast } of clades) expect(contrast.difference).toBeCloseTo(0.8, 14);
	});

	// Property: only membership matters, so p is the share of subsets of the clade's size that differ as much.
	it('has the p that choosing members in every way gives, on the whole tree and inside the parent', () => {
		fc.assert(
			fc.property(fc.integer({ min: 5, max: 7 }), fc.nat(1000), (count, seed) => {
				const stream = randomStream(seed, 0, 8);
				const tree = drawnTree(count, stream, { polytomies: true });
				const shape = treeShape(tree);
				const overlap = drawnOverlap(count, stream, 1);
				const groups = cladesOf(shape, 2);
				fc.pre(groups.length > 0);
				for (const { group, p, beyond } of testClades({ ...asked, tree, overlap, groups }).clades) {
					const all = Array.from({ length: count }, (_, i) => i);
					expect(p).toBeCloseTo(shareAsDifferent(overlap, all, [...group.members]), 12);
					const { parent = 0 } = beyond ?? {};
					const inside = all.slice(shape.tipFrom[parent], shape.tipTo[parent]);
					expect(beyond?.p).toBeCloseTo(shareAsDifferent(overlap, inside, [...group.members]), 12);
				}
			}),
			{ numRuns: 25 }
		);
	});

	it('asks beyond the parent with the free shuffles where the parent is the whole tree', () => {
		const { clades } = testClades(ofTree('(((A:1,B:1):1,C:2):1,((D:1,E:1):1,F:2):1);', blocks('aaabbb', 0.9, 0.1), 2));
		for (const { beyond, p } of clades.filter((clade) => clade.beyond?.parent === 0)) expect(beyond?.p).toBe(p);
		expect(clades.filter(({ beyond }) => beyond?.parent === 0)).toHaveLength(2);
	});

	it('takes a declared group that is no clade, without asking beyond a parent it has not', () => {
		const tree = exampleTree('(((A:1,B:1):1,C:2):1,((D:1,E:1):1,F:2):1);');
		const overlap = blocks('aabbab', 0.9, 0.1);
		const { clades } = testClades({ ...asked, tree, overlap, groups: [groupOf(treeShape(tree), [0, 1, 4])] });
		expect(clades[0]).toMatchObject({ p: 2 / 20, beyond: null, holds: false });
	});

	it('gives the same numbers whatever else is declared beside a clade, but for the adjustment', () => {
		const overlap = drawnOverlap(12, randomStream(4, 0, 8));
		const tree = drawnTree(12, randomStream(5, 0, 8));
		const groups = cladesOf(treeShape(tree), 3);
		const all = testClades({ ...asked, tree, overlap, groups }).clades;
		for (const [g, group] of groups.entries()) {
			const [alone] = testClades({ ...asked, tree, overlap, groups: [group] }).clades;
			expect(alone?.p).toBe(all[g]?.p);
			expect(alone?.pAdjusted).toBe(alone?.p);
			expect(alone?.beyond?.p).toBe(all[g]?.beyond?.p);
		}
	});

	it('is the same for the same seed', () => {
		const question = { ...asked, tree: drawnTree(12, randomStream(5, 0, 8)), overlap: drawnOverlap(12, randomStream(4, 0, 8)) };
		const groups = cladesOf(treeShape(question.tree), 3);
		expect(testClades({ ...question, groups })).toEqual(testClades({ ...question, groups }));
		expect(testClades({ ...question, groups, seed: 2 })).not.toEqual(testClades({ ...question, groups }));
	});
});

/** Share of the subsets of `among` of the size of `members` that are as much more alike inside than with the rest. */
function shareAsDifferent(overlap: Float64Array, among: readonly number[], members: readonly number[]): number {
	const size = Math.sqrt(overlap.length);
	const local = Float64Array.from(among.flatMap((a) => among.map((b) => overlap[a * size + b] ?? 0)));
	const at = (chosen: readonly number[]) =>
		cladeContrast(
			local,
			among.length,
			Int32Array.from(chosen, (species) => among.indexOf(species))
		).difference ?? 0;
	const all = subsets(among, members.length);
	const observed = at(members);
	return all.filter((chosen) => at(chosen) >= observed - 1e-9).length / all.length;
}

function subsets(of: readonly number[], size: number): number[][] {
	if (size === 0) return [[]];
	return of.flatMap((first, i) => subsets(of.slice(i + 1), size - 1).map((rest) => [first, ...rest]));
}
