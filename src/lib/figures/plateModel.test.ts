import { describe, expect, it } from 'vitest';
import { ladderPlate, microPlate } from './microPlate.fixture.ts';
import { pairPlace, plateModel } from './plateModel.ts';

describe('plateModel', () => {
	const model = plateModel(microPlate());

	// By hand from (((A,B),C),D): rows A 0, B 1, C 2, D 3.
	it('gives every node its rows and the pairs across it', () => {
		expect(model.nodes.map(({ node, from, to, pairCount }) => [node, from, to, pairCount])).toEqual([
			[0, 0, 4, 3],
			[1, 0, 3, 2],
			[2, 0, 2, 1]
		]);
		expect(model.nodes[0]?.sides).toEqual([
			{ from: 0, to: 3 },
			{ from: 3, to: 4 }
		]);
	});

	// By hand: AB meet at node 2, AC and BC at 1, the rest at the root.
	it('knows the common ancestor of every pair', () => {
		expect([...model.ancestor]).toEqual([2, 1, 1, 0, 0, 0]);
		expect(model.ancestor[pairPlace(2, 0)]).toBe(1);
	});

	it('takes node means from the result', () => {
		expect(model.nodes.map(({ mean }) => mean)).toEqual([9 / 20, 13 / 20, 4 / 5]);
	});

	// The worked micro-example: nested 9/20 and plain 13/30 at the root.
	it('works out the means itself when the result has none yet', () => {
		const input = { ...microPlate(), nodeAverages: { nodes: [], nested: null, plain: null } };
		expect(plateModel(input).nodes[0]?.mean).toBeCloseTo(9 / 20, 12);
		expect(plateModel(input, 'plain').nodes[0]?.mean).toBeCloseTo(13 / 30, 12);
	});

	it('walks a ladder of 2,000 species', () => {
		const ladder = plateModel(ladderPlate(2000));
		expect(ladder.nodes).toHaveLength(1999);
		expect(ladder.nodes.at(-1)?.pairCount).toBe(1);
	});

	it('refuses plate data that disagree with one another', () => {
		expect(() => plateModel(microPlate(['A', 'B', 'C']))).toThrow('Plate data disagree: 4 tips, 3 species, 6 pairs.');
	});
});
