import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { exampleTree } from '../exampleTrees.ts';
import { randomStream } from '../randomStream.ts';
import { gaussianOverlap } from './gaussianOverlap.ts';
import { expectedOverlap } from './randomWalkFall.ts';
import { centreDistance, centreWalker } from './walkedNiches.ts';

const tree = exampleTree('((A:1,B:1):3,(C:2,D:2):2);');
const DRAWS = 20_000;

function drawn(axes: number, rate: number, chunk: number) {
	const walk = centreWalker(tree, treeShape(tree));
	const stream = randomStream(20261, chunk);
	return Array.from({ length: DRAWS }, () => walk({ axes, rate }, stream));
}

describe('centreWalker', () => {
	it('gives centres the covariance of shared history', () => {
		const centres = drawn(1, 0.5, 0);
		const moment = (i: number, j: number) =>
			centres.reduce((sum, { places }) => sum + (places[i] ?? 0) * (places[j] ?? 0), 0) / DRAWS;
		// By hand: rate · (4 - age of the pair). Standard errors: variance 2 · sqrt(2 / draws) = .02, covariances below .018.
		expect(Math.abs(moment(0, 0) - 2)).toBeLessThan(0.08);
		expect(Math.abs(moment(0, 1) - 1.5)).toBeLessThan(0.07);
		expect(Math.abs(moment(2, 3) - 1)).toBeLessThan(0.06);
		expect(Math.abs(moment(0, 2))).toBeLessThan(0.06);
	});

	it.each([1, 2, 4] as const)('makes overlaps whose mean at an age is the curve, with %d axes', (axes) => {
		// θ of A and C, age 4 at rate 0.5: 0.5 · 4 / 2 = 1. Standard error below .3 / sqrt(draws) = .0022.
		const centres = drawn(axes, 0.5, axes);
		for (const measure of ['schoener-d', 'warren-i'] as const) {
			const sum = centres.reduce((total, one) => total + gaussianOverlap(measure, centreDistance(one, 0, 2)), 0);
			expect(Math.abs(sum / DRAWS - expectedOverlap(measure, axes, 1))).toBeLessThan(0.009);
		}
	});

	it('makes D of one axis uniform at θ = 1', () => {
		// Derived: P(D <= u) = u at θ = 1. Standard error of a share below .0036.
		const overlaps = drawn(1, 0.5, 7).map((one) => gaussianOverlap('schoener-d', centreDistance(one, 0, 2)));
		for (const u of [0.05, 0.5, 0.95]) {
			expect(Math.abs(overlaps.filter((overlap) => overlap <= u).length / DRAWS - u)).toBeLessThan(0.014);
		}
	});
});
