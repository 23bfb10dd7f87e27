import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { drawnOverlap, drawnTree, exampleTree } from '../exampleTrees.ts';
import { pairBlocks } from '../pairBlocks.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { randomStream, STREAM_DOMAIN } from '../randomStream.ts';
import { ageClasses, bandShuffles, classesByAge } from './ageClasses.ts';

function asked(tree: ReturnType<typeof drawnTree>, overlap: Float64Array, permutations = 499) {
	const shape = treeShape(tree);
	const tipCount = shape.tips.length;
	const input = { layout: pairBlocks(shape), overlap, tipCount };
	const ages = Float64Array.from(shape.internal, (node) => tree.ages[node] ?? 0);
	const groups = [{ from: 0, to: tipCount }];
	return ageClasses(input, ages, { tipCount, groups, domain: STREAM_DOMAIN.free, seed: 7, permutations });
}

describe('classesByAge', () => {
	// By hand: √9 = 3 classes of 3; √16 = 4 of 4; √100 = 10, held to 8; below 9 nodes still 3.
	it.each([
		[9, [3, 3, 3]],
		[16, [4, 4, 4, 4]],
		[5, [2, 1, 2]],
		[2, [1, 1]],
		[100, [13, 12, 13, 12, 13, 12, 13, 12]]
	])('parts %d nodes into equal numbers', (count, sizes) => {
		const ages = Float64Array.from({ length: count }, (_, i) => 1 + ((i * 37) % 101));
		expect(classesByAge(ages).map((slots) => slots.length)).toEqual(sizes);
	});

	it('keeps every node once, the young before the old, and equal ages together', () => {
		fc.assert(
			fc.property(fc.array(fc.integer({ min: 0, max: 6 }), { minLength: 1, maxLength: 60 }), (whole) => {
				const ages = Float64Array.from(whole);
				const classes = classesByAge(ages);
				expect(classes.flat().sort((a, b) => a - b)).toEqual(whole.map((_, slot) => slot));
				for (const [i, slots] of classes.entries()) {
					const next = classes[i + 1];
					if (next === undefined) continue;
					expect(Math.max(...slots.map((s) => whole[s] ?? 0))).toBeLessThan(Math.min(...next.map((s) => whole[s] ?? 0)));
				}
			})
		);
	});
});

describe('ageClasses', () => {
	// The worked example: AB .8, AC .7, BC .6, AD .4, BD .4, CD .5; three nodes, so each is a class.
	const micro = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
	const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);

	it('gives the means, pairs and nodes of the worked example', () => {
		const rows = asked(micro, overlap).map(({ from, to, nodes, pairs, mean }) => [from, to, nodes, pairs, mean.toFixed(9)]);
		expect(rows).toEqual([
			[1, 1, 1, 1, '0.800000000'],
			[2, 2, 1, 2, '0.650000000'],
			[4, 4, 1, 3, '0.433333333']
		]);
	});

	it('reads the band from all arrangements when they are few', () => {
		const [youngest] = asked(micro, overlap);
		// By hand: the youngest pair is each of the six in 4 of 24 arrangements; sorted .4 .4 .5 .6 .7 .8, so type 7 quantiles:
		// at 23 · .025 = .575 still .4, at 11.5 midway of .5 and .6, at 22.425 already .8.
		expect(youngest?.shuffled.map((value) => value.toFixed(9))).toEqual(['0.400000000', '0.550000000', '0.800000000']);
	});

	it('lies inside the range of the overlaps, its parts in order', () => {
		for (const row of asked(drawnTree(30, randomStream(3, 0), { polytomies: true }), drawnOverlap(30, randomStream(3, 1)))) {
			const [low, middle, high] = row.shuffled;
			expect(0 <= low && low <= middle && middle <= high && high <= 1).toBe(true);
		}
	});

	it('covers the means of exchangeable species as often as it says, pointwise', () => {
		const tree = drawnTree(20, randomStream(5, 0));
		let [inside, all] = [0, 0];
		for (let data = 0; data < 120; data++) {
			for (const { mean, shuffled } of asked(tree, drawnOverlap(20, randomStream(6, data), 6), 199)) {
				all++;
				if (shuffled[0] <= mean && mean <= shuffled[2]) inside++;
			}
		}
		// 480 nearly independent looks at .95: standard error .01; 199 shuffles widen the tail a little.
		expect(Math.abs(inside / all - 0.95)).toBeLessThan(0.035);
	});

	it('reads fewer shuffles of large matrices', () => {
		expect(bandShuffles(50)).toBe(1999);
		expect(bandShuffles(2000)).toBe(199);
	});
});
