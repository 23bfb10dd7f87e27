import { describe, expect, it } from 'vitest';
import { ladderPlate, microPlate } from './microPlate.fixture.ts';
import { nodeDiamonds, nodesWithDiamond } from './nodeDiamonds.ts';
import { overlapAxis } from './overlapAxis.ts';
import { columnSizes, pairColumns } from './pairColumns.ts';
import { plateModel } from './plateModel.ts';

const panel = { x: 0, y: 0, width: 400, height: 200 };

function columnsOf(input: ReturnType<typeof microPlate>) {
	const model = plateModel(input);
	const axis = overlapAxis(model.overlap, panel);
	return { model, axis, columns: pairColumns(model, (age) => 100 * age, axis, columnSizes(model.nodes, 400)) };
}

describe('pairColumns', () => {
	// By hand: AB is a node with one pair (its diamond), ABC has two dots at 200, the root three about 400.
	it('draws every pair of a small tree as a dot under its node, and a lone pair only as its diamond', () => {
		const { dots, bars } = columnsOf(microPlate()).columns;
		expect(dots.map(({ node, i, j }) => `${node}: ${i}-${j}`)).toEqual(['1: 0-2', '1: 1-2', '0: 0-3', '0: 1-3', '0: 2-3']);
		expect(bars).toEqual([]);
		expect(dots.filter(({ node }) => node === 1).every(({ x }) => x === 200)).toBe(true);
	});

	// By hand: in a ladder of 15 the oldest nodes have 14 and 13 pairs; all equal, so each strip is one bar.
	it('draws more than twelve pairs as a strip mirrored about the age', () => {
		const { bars } = columnsOf(ladderPlate(15)).columns;
		expect(bars.map(({ x, width }) => x + width / 2)).toEqual([1300, 1400]);
	});
});

describe('nodeDiamonds', () => {
	it('fills the diamond of a node with one pair', () => {
		const { model, axis } = columnsOf(microPlate());
		expect(nodeDiamonds(model, (age) => 100 * age, axis).map(({ node, filled }) => [node, filled])).toEqual([
			[2, true],
			[1, false],
			[0, false]
		]);
	});

	it('lets diamonds of equal age and mean dodge sideways, and moves no other', () => {
		const { model, axis } = columnsOf(ladderPlate(4));
		const x = nodeDiamonds(model, () => 50, axis).map((diamond) => diamond.x);
		expect(new Set(x).size).toBe(3);
		const spread = nodeDiamonds(model, (age) => 100 * age, axis).map((diamond) => diamond.x);
		expect(spread).toEqual([100, 200, 300]);
	});

	it('draws the twenty largest of more than sixty nodes', () => {
		const { nodes } = plateModel(ladderPlate(62));
		expect(nodesWithDiamond(nodes)).toHaveLength(20);
		expect(Math.min(...nodesWithDiamond(nodes).map(({ pairCount }) => pairCount))).toBe(42);
		expect(nodesWithDiamond(nodes.slice(1))).toHaveLength(60);
	});
});
