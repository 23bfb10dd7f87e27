import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { drawnOverlap, drawnTree } from '../exampleTrees.ts';
import { randomStream } from '../randomStream.ts';
import { shuffleBatches } from '../shuffleBatches.ts';
import { cladesOf, type SpeciesGroup } from './cladeList.ts';
import { directWithinSums } from './directSums.ts';
import { cladeWithinSums } from './withinSums.ts';

describe('sums within groups', () => {
	it('agree, through the nodes of the tree or group by group, with adding up the pairs one by one', () => {
		fc.assert(
			fc.property(fc.integer({ min: 4, max: 14 }), fc.nat(1000), (count, seed) => {
				const stream = randomStream(seed, 0, 8);
				const shape = treeShape(drawnTree(count, stream, { polytomies: true }));
				const clades = cladesOf(shape, 2);
				fc.pre(clades.length > 0);
				const matrix = drawnOverlap(count, stream, 6);
				const question = { tipCount: count, groups: [{ from: 0, to: count }], domain: 0, seed, permutations: 3 };
				const [batch] = shuffleBatches(question);
				if (batch === undefined) throw new Error('Every question has a batch.');
				const few = { ...batch, count: Math.min(3, batch.count) };
				const expected = Array.from({ length: few.count }, (_, drawn) =>
					clades.map((clade) => addedUp(clade, few.arrangements.subarray(drawn * count, (drawn + 1) * count), matrix))
				).flat();
				for (const sums of [cladeWithinSums(shape, clades, matrix)(few), directWithinSums(clades, count, matrix)(few)]) {
					expect(sums.length).toBe(expected.length);
					for (const [i, value] of sums.entries()) expect(value).toBeCloseTo(expected[i] ?? Number.NaN, 9);
				}
			}),
			{ numRuns: 40 }
		);
	});
});

function addedUp({ members }: SpeciesGroup, arrangement: Int32Array, matrix: Float64Array): number {
	const count = arrangement.length;
	const species = Array.from(members, (position) => arrangement[position] ?? 0);
	return species.reduce(
		(sum, a, i) => sum + species.slice(0, i).reduce((inner, b) => inner + (matrix[a * count + b] ?? 0), 0),
		0
	);
}
