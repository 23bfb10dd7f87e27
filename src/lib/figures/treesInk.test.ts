import { describe, expect, it } from 'vitest';
import { ageScale } from './ageScale.ts';
import { microPlate } from './microPlate.fixture.ts';
import { plateModel } from './plateModel.ts';
import { plateScene } from './plateScene.ts';
import { treeLayout } from './treeLayout.ts';
import { ageBarsPath } from './treesInk.ts';

const request = {
	width: 800,
	direction: 'present-right',
	maxHeight: 2000,
	smallestName: 6,
	abbreviateGenus: false,
	average: 'nested'
} as const;
const x = ageScale({ kind: 'linear' }, 4, [0, 400]);
const place = treeLayout(plateModel(microPlate()), x, { top: 0, pitch: 10 });

describe('ageBarsPath', () => {
	// By hand: 100 units for 1 Ma. AB lies at the mean of rows 5 and 15; the root's bar ends with the axis, at 400.
	it('runs along the age axis from the youngest to the oldest age, no farther than the root', () => {
		const nodes = [
			{ node: 0, share: 1, age: [3, 5] as [number, number] },
			{ node: 1, share: 0, age: null },
			{ node: 2, share: 0.5, age: [0.5, 1.5] as [number, number] }
		];
		expect(ageBarsPath({ nodes }, place, { x, pitch: 10 })).toMatch(/^M300 [\d.]+H400M50 10H150$/);
	});

	it('leaves out what lies beyond the root, and all where rows are close', () => {
		const nodes = [{ node: 2, share: 1, age: [5, 6] as [number, number] }];
		expect(ageBarsPath({ nodes }, place, { x, pitch: 10 })).toBe('');
		expect(ageBarsPath({ nodes: [{ node: 2, share: 1, age: [1, 2] }] }, place, { x, pitch: 5 })).toBe('');
	});
});

describe('treeLinesPath', () => {
	it('draws a line for every tree, and none on a plate of one tree', () => {
		const lines = [-0.1, -0.12, -0.11].map((slope) => ({ slope, intercept: 0.9 }));
		const scene = plateScene({ ...microPlate(), trees: { lines, nodes: [] } }, request);
		expect(scene.treeLines.match(/M/g)).toHaveLength(3);
		expect(plateScene(microPlate(), request)).toMatchObject({ treeLines: '', ageBars: '' });
	});
});
