import type { FallMeasure } from './gaussianOverlap.ts';
import type { NodeAges } from './nodeMeans.ts';
import { type Axes, expectedOverlap, overlapFallRate } from './randomWalkFall.ts';

/** θ at the root between which k is sought: below, no pair has parted visibly; above, none has anything in common. */
const LEAST_ROOT_THETA = 1e-6;
const MOST_ROOT_THETA = 1e8;
/** Steps of the first look, on ln k: each multiplies k by 1.71, far finer than the curve can bend. */
const GRID_STEPS = 60;
/** Where a step of the search moves ln k by less, k is found to 11 digits. */
const SETTLED = 1e-12;
/** The search gains digits faster than halving does; so many steps are never needed. */
const MOST_STEPS = 80;

export type FallFit = {
	/** k in θ = k t; per unit of age; 0 where every mean is 1 */
	readonly k: number;
	/** weighted sum of squared residuals of the node means; of pairs it differs by a constant */
	readonly residual: number;
};

export type FallCurve = {
	/** the curve at the ages of the nodes of its tree, shape (slots,) */
	readonly at: (k: number) => Float64Array;
	readonly fit: (means: Float64Array) => FallFit;
};

/**
 * The one-parameter curve E[overlap | θ = k t] on the nodes of one tree, and its least-squares fit to the pairs. A grid
 * over ln k, kept for every fit on this tree, finds the valley; the zero of the derivative is its floor. At the
 * ends of the grid k is the end: overlaps that are all alike, or lost before the youngest node.
 *
 * Cost: about 10 values of the curve per node and fit, the grid's being looked up.
 */
export function fallCurve(measure: FallMeasure, axes: Axes, { ages, pairs }: NodeAges): FallCurve {
	const rootAge = Math.max(...ages);
	const [from, to] = [LEAST_ROOT_THETA, MOST_ROOT_THETA].map((theta) => Math.log(theta / rootAge));
	const step = ((to ?? 0) - (from ?? 0)) / GRID_STEPS;
	const at = (k: number): Float64Array => ages.map((age) => expectedOverlap(measure, axes, k * age));
	const grid = Array.from({ length: GRID_STEPS + 1 }, (_, i) => (from ?? 0) + i * step);
	const curves = grid.map((lnK) => at(Math.exp(lnK)));

	const gradient = (lnK: number, means: Float64Array): number => {
		let sum = 0;
		for (const [slot, age] of ages.entries()) {
			const theta = Math.exp(lnK) * age;
			const residual = (means[slot] ?? 0) - expectedOverlap(measure, axes, theta);
			sum -= (pairs[slot] ?? 0) * residual * overlapFallRate(measure, axes, theta);
		}
		return sum;
	};
	const fit = (means: Float64Array): FallFit => {
		const residuals = curves.map((curve) => squares(curve, means, pairs));
		const best = residuals.indexOf(Math.min(...residuals));
		const k = Math.exp(
			crossing((lnK) => gradient(lnK, means), grid[Math.max(0, best - 1)] ?? 0, grid[Math.min(GRID_STEPS, best + 1)] ?? 0)
		);
		return { k, residual: squares(at(k), means, pairs) };
	};
	return { at, fit };
}

/**
 * Where a rising function crosses 0 between two ends, by the Illinois form of false position; an end where it does not.
 * @see Dowell & Jarratt (1971), doi:10.1007/BF01934364
 */
function crossing(slopeAt: (lnK: number) => number, from: number, to: number): number {
	let [low, high] = [from, to];
	let [below, above] = [slopeAt(low), slopeAt(high)];
	if (below >= 0) return low;
	if (above <= 0) return high;
	let last = Number.NaN;
	let moved: 'low' | 'high' | null = null;
	for (let step = 0; step < MOST_STEPS; step++) {
		const guess = high - (above * (high - low)) / (above - below);
		if (Math.abs(guess - last) < SETTLED) return guess;
		last = guess;
		const value = slopeAt(guess);
		if (value === 0) return guess;
		if (value > 0) {
			[high, above] = [guess, value];
			// An end that stays twice running counts half, or it would stay for ever.
			if (moved === 'high') below /= 2;
			moved = 'high';
		} else {
			[low, below] = [guess, value];
			if (moved === 'low') above /= 2;
			moved = 'low';
		}
	}
	return last;
}

function squares(curve: Float64Array, means: Float64Array, pairs: Float64Array): number {
	let sum = 0;
	for (let slot = 0; slot < curve.length; slot++) {
		sum += (pairs[slot] ?? 0) * ((means[slot] ?? 0) - (curve[slot] ?? 0)) ** 2;
	}
	return sum;
}
