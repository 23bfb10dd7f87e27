import { describe, expect, it } from 'vitest';
import { ladderPlate, microPlate } from './microPlate.fixture.ts';
import { plateModel } from './plateModel.ts';
import { cladePath, treeInk, treeLayout } from './treeLayout.ts';

const rows = { top: 0, pitch: 10 };

describe('treeLayout', () => {
	// By hand: A 5, B 15, C 25, D 35; AB (5 + 15) / 2, ABC (10 + 25) / 2, root (17.5 + 35) / 2.
	it('puts tips in their rows and nodes at the mean of their daughters', () => {
		const place = treeLayout(plateModel(microPlate()), (age) => 100 * age, rows);
		expect([...place.y]).toEqual([26.25, 17.5, 10, 5, 15, 25, 35]);
		expect([...place.x]).toEqual([400, 200, 100, 0, 0, 0, 0]);
	});

	it('lays out a ladder of 2,000 species', () => {
		const place = treeLayout(plateModel(ladderPlate(2000)), (age) => age, rows);
		expect(place.y.every((y) => y > 0 && y < 20_000)).toBe(true);
	});
});

describe('treeInk', () => {
	it('keeps the bar of a node of three ways apart, with its number of ways', () => {
		const base = microPlate();
		const tree = { parent: [-1, 0, 1, 1, 1, 0], age: [4, 2, 0, 0, 0, 0], label: ['', '', 'A', 'B', 'C', 'D'] };
		const model = plateModel({ ...base, plate: { ...base.plate, tree }, nodeAverages: { ...base.nodeAverages, nodes: [] } });
		const ink = treeInk(
			model,
			treeLayout(model, (age) => age, rows)
		);
		// By hand: from A at 5 to C at 25.
		expect(ink.polytomies).toEqual([{ x: 2, y0: 5, y1: 25, ways: 3 }]);
		expect(ink.branches.match(/V/g)).toHaveLength(1);
	});
});

describe('cladePath', () => {
	// By hand: below ABC lie four branches (AB, A, B, C) and two bars (ABC, AB).
	it('holds the branches and bars below a node and no others', () => {
		const model = plateModel(microPlate());
		const path = cladePath(
			model,
			treeLayout(model, (age) => age, rows),
			1
		);
		expect(path.match(/H/g)).toHaveLength(4);
		expect(path.match(/V/g)).toHaveLength(2);
	});
});
