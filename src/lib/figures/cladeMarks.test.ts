import { describe, expect, it } from 'vitest';
import { cladeMarks } from './cladeMarks.ts';
import { microPlate } from './microPlate.fixture.ts';
import { plateScene } from './plateScene.ts';

const request = { width: 900, direction: 'present-left', maxHeight: Infinity, smallestName: 7, abbreviateGenus: true } as const;
const clades = [
	{ node: 1, holds: true },
	{ node: 2, holds: false },
	{ node: null, holds: true }
];

describe('cladeMarks', () => {
	it('marks nothing where no clade was asked about', () => {
		expect(cladeMarks(plateScene(microPlate(), { ...request, average: 'plain' }))).toEqual([]);
	});

	// By hand: node 1 holds A, B, C, the first three rows; its bracket runs from 12 % into the first to 12 % before the end.
	it.each([
		['present-left', 1],
		['present-right', -1]
	] as const)('brackets a clade that holds, rootward of its node, and no other: %s', (direction, rootward) => {
		const scene = plateScene({ ...microPlate(), clades }, { ...request, direction, average: 'plain' });
		const marks = cladeMarks(scene);
		expect(marks.map(({ node }) => node)).toEqual([1]);
		const numbers = (marks[0]?.bracket ?? '')
			.split(/[MHV ]/)
			.filter((text) => text !== '')
			.map(Number);
		const [hook = 0, top = 0, x = 0, foot = 0] = numbers;
		expect((x - (scene.treePlace.x[1] ?? 0)) * rootward).toBeGreaterThan(0);
		expect((x - hook) * rootward).toBeGreaterThan(0);
		expect(top).toBeCloseTo(scene.layout.tree.y + 0.12 * scene.layout.pitch, 1);
		expect(foot).toBeCloseTo(scene.layout.tree.y + 2.88 * scene.layout.pitch, 1);
		expect(marks[0]?.triangle.match(/[ML]/g)).toHaveLength(3);
	});
});
