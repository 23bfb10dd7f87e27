import { describe, expect, it } from 'vitest';
import { type AgedTree, treeShape } from '../agedTree.ts';
import { drawnOverlap, exampleTree, pairAgeMatrix } from '../exampleTrees.ts';
import { pairBlocks } from '../pairBlocks.ts';
import { symmetricMatrix } from '../pairValues.ts';
import { nextNormal, randomStream } from '../randomStream.ts';
import { describeFall } from './describeFall.ts';
import { fallShape } from './fallShape.ts';
import { gaussianOverlap } from './gaussianOverlap.ts';
import { halfOverlapAge } from './halfOverlapAge.ts';
import { nodeMeans } from './nodeMeans.ts';
import { expectedOverlap } from './randomWalkFall.ts';
import { fallReader } from './walkedFalls.ts';
import { youngResidual, youngSlots } from './youngPairs.ts';
import { yuleTree } from './yuleTree.fixture.ts';

const SEED = 20262;

describe('describeFall', () => {
	const micro = exampleTree('(((A:1,B:1):1,C:2):2,D:4);');
	const overlap = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
	const fall = describeFall({ measure: 'schoener-d', tree: micro, overlap, seed: 1 });

	it('reads the half-overlap age of the worked example off the curve', () => {
		// R 4.2, see the test of the fit: 1 / k = 3.80587279598113.
		expect(fall.fits[0]?.halfOverlapAge).toBeCloseTo(3.80587279598113, 10);
		const last = fall.fits[0]?.curve.at(-1);
		expect(last?.[0]).toBe(4);
		expect(last?.[1]).toBeCloseTo(expectedOverlap('schoener-d', 1, 4 / 3.80587279598113), 10);
	});

	it('starts every curve at age 0 with 1', () => {
		expect(fall.fits.map(({ axes, curve }) => [axes, curve[0]])).toEqual([1, 2, 4].map((axes) => [axes, [0, 1]]));
	});

	it('gives equal bits for equal seeds, and holds no number that is not one', () => {
		expect(describeFall({ measure: 'schoener-d', tree: micro, overlap, seed: 1 })).toEqual(fall);
		expect(JSON.stringify(fall)).not.toMatch(/NaN|Infinity/);
		const flat = describeFall({
			measure: 'warren-i',
			tree: micro,
			overlap: symmetricMatrix([1, 1, 1, 1, 1, 0.999999], 4, 1),
			seed: 1
		});
		expect(flat.fits.map(({ halfOverlapAge: age, range }) => [age, range[1]])).toEqual([1, 2, 4].map(() => [null, null]));
		for (const number of JSON.stringify(flat).match(/:null|:[-\d.e]+/g) ?? []) expect(number).not.toBe(':NaN');
	});

	it('tells how far a floor and a ceiling would move the age', () => {
		// On a pure-birth tree of 20 as deep as 8 with the very curve of a half-overlap age of 1 (methods: a floor of .3 makes 1.0
		// into 2.8) and of 4 (a ceiling of .8 makes 4.0 into 1.4): several-fold up and less than half.
		const deep = yuleTree(20, randomStream(SEED, 1));
		const tree = { parent: deep.parent, ages: deep.ages.map((age) => 8 * age) };
		const [one, four] = [1, 4].map((half) =>
			describeFall({ measure: 'schoener-d', tree, overlap: exactCurve(tree, 1 / half), seed: 1 })
		);
		expect(one?.fits[0]?.halfOverlapAge).toBeCloseTo(1, 8);
		expect(one?.withFloor.halfOverlapAge).toBeGreaterThan(2.5);
		expect(four?.fits[0]?.halfOverlapAge).toBeCloseTo(4, 8);
		expect(four?.withCeiling.halfOverlapAge).toBeLessThan(2.5);
	});

	it('refuses what is not a number', () => {
		const broken = symmetricMatrix([1, 1, 1, 1, 1, Number.NaN], 4, 1);
		expect(() => describeFall({ measure: 'schoener-d', tree: micro, overlap: broken, seed: 1 })).toThrow('rows 4 and 3');
	});
});

/** Every pair exactly on the curve. */
function exactCurve(tree: AgedTree, k: number): Float64Array {
	return pairAgeMatrix(tree).map((age) => expectedOverlap('schoener-d', 1, k * age));
}

describe('halfOverlapAge', () => {
	it('mirrors the errors of the walks about the fit, and leaves out what lies beyond the root', () => {
		// By hand: k 0.5, θ 1: age 2. Walks fitted k twice too high or too low: the true k may be half or double, age 4 or 1.
		const walked = Array.from({ length: 101 }, (_, i) => (i < 51 ? 1 : 0.25));
		expect(halfOverlapAge({ k: 0.5, walked, theta: 1, rootAge: 10 })).toEqual({ halfOverlapAge: 2, range: [1, 4] });
		expect(halfOverlapAge({ k: 0.5, walked, theta: 1, rootAge: 3 })).toEqual({ halfOverlapAge: 2, range: [1, null] });
		expect(halfOverlapAge({ k: 0.5, walked, theta: 1, rootAge: 1.5 })).toEqual({ halfOverlapAge: null, range: [1, null] });
	});

	it('holds the true age about as often as it says', () => {
		let held = 0;
		for (let data = 0; data < 150; data++) {
			const reader = fallReader('schoener-d', 1, yuleTree(20, randomStream(SEED, data, 93)));
			const seeding = { seed: SEED, domain: 94, chunk: 2 * data };
			const [observed] = reader.walk(1, 1, seeding);
			if (observed === undefined) continue;
			const walked = reader.walk(observed.k, 99, { ...seeding, chunk: 2 * data + 1 }).map(({ k }) => k);
			const { range } = halfOverlapAge({ k: observed.k, walked, theta: 1, rootAge: 1e9 });
			if ((range[0] ?? 0) <= 1 && 1 <= (range[1] ?? 0)) held++;
		}
		// Nominal .90; measured .91 on 200 other trees; standard error .025.
		expect(Math.abs(held / 150 - 0.9)).toBeLessThan(0.075);
	});
});

describe('youngSlots and youngResidual', () => {
	it('take the youngest third of the nodes, equal ages with them, weighted by pairs', () => {
		expect(youngSlots(Float64Array.of(9, 3, 1, 4, 2, 8))).toEqual([2, 4]);
		expect(youngSlots(Float64Array.of(9, 1, 1, 1))).toEqual([1, 2, 3]);
		expect(youngSlots(Float64Array.of(9, 4))).toEqual([1]);
		const residuals = {
			means: Float64Array.of(0, 0.5, 0.9),
			curve: Float64Array.of(0, 0.6, 0.6),
			pairs: Float64Array.of(9, 1, 3)
		};
		// By hand: (1 · -.1 + 3 · .3) / 4.
		expect(youngResidual([1, 2], residuals)).toBeCloseTo(0.2, 12);
	});
});

describe('fallShape', () => {
	const DATA = 20;
	const words = (places: (tree: ReturnType<typeof yuleTree>, data: number) => Float64Array) => {
		const counts = { 'more-alike': 0, follows: 0, 'less-alike-then-level': 0 };
		for (let data = 0; data < DATA; data++) {
			const tree = yuleTree(30, randomStream(SEED, data, 95));
			const at = places(tree, data);
			const layout = pairBlocks(treeShape(tree));
			const reader = fallReader('schoener-d', 1, tree);
			const observed = reader.read(
				nodeMeans(layout, (i, j) => gaussianOverlap('schoener-d', Math.abs((at[i] ?? 0) - (at[j] ?? 0))))
			);
			const walked = reader.walk(observed.k, 99, { seed: SEED, domain: 96, chunk: data });
			counts[fallShape({ reader, observed, walked, seed: SEED, chunk: 5 * data }).word]++;
		}
		return counts;
	};
	/** Centres that lose `pull` of their distance from 0, and gain `spread`, along a branch. */
	const walk =
		(step: (from: number, to: number) => { pull: number; spread: number }) =>
		(tree: ReturnType<typeof yuleTree>, data: number): Float64Array => {
			const stream = randomStream(SEED, data, 97);
			const at = new Float64Array(tree.parent.length);
			for (let node = 1; node < at.length; node++) {
				const above = tree.parent[node] ?? 0;
				const { pull, spread } = step(tree.ages[above] ?? 0, tree.ages[node] ?? 0);
				at[node] = (at[above] ?? 0) * (1 - pull) + spread * nextNormal(stream);
			}
			return Float64Array.from(treeShape(tree).tips, (tip) => at[tip] ?? 0);
		};

	// Measured by hand on 120 other trees of 30: a walk .01, white noise .94 below, a walk pulled back with half-life .1
	// .81 below, an early burst .65 above. Bounds leave three standard errors at 20 trees.
	it('says that a random walk follows the curve', () => {
		expect(words(walk((from, to) => ({ pull: 0, spread: Math.sqrt(2 * (from - to)) }))).follows).toBeGreaterThanOrEqual(17);
	});

	it('finds young pairs less alike under noise, and more alike after an early burst', () => {
		expect(words(walk(() => ({ pull: 1, spread: 1 })))['less-alike-then-level']).toBeGreaterThanOrEqual(15);
		const burst = (from: number, to: number) => (8 * (Math.exp(-4.6 * (1 - from)) - Math.exp(-4.6 * (1 - to)))) / 4.6;
		const counts = words(walk((from, to) => ({ pull: 0, spread: Math.sqrt(burst(from, to)) })));
		expect(counts['more-alike']).toBeGreaterThanOrEqual(7);
		expect(counts['less-alike-then-level']).toBeLessThanOrEqual(2);
	});

	it('calls nothing certain: p lies in (0, 1], and drawn overlaps give shares', () => {
		const tree = yuleTree(15, randomStream(SEED, 1));
		for (const { shape } of describeFall({ measure: 'schoener-d', tree, overlap: drawnOverlap(15, randomStream(1, 1)), seed: 3 })
			.fits) {
			expect(shape.p > 0 && shape.p <= 1 && shape.size >= 0 && shape.size <= 1).toBe(true);
		}
	});
});
