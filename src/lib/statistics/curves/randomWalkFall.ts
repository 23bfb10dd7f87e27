import type { FallMeasure } from './gaussianOverlap.ts';

/** Numbers of niche axes that the curve is drawn for. */
export const AXES = [1, 2, 4] as const;
export type Axes = (typeof AXES)[number];

/**
 * Expected overlap of two species whose niche centres walked at random apart: Gaussian niches of one width s, centres by
 * Brownian motion of rate v on each of d axes, θ = v t / (2 s²) at common ancestor age t.
 *
 * E[D | t] = P(|T_d| > √(d θ)), T_d Student's t with d degrees of freedom, here in its elementary forms written so that
 * large θ loses no digits; E[I | t] = (1 + θ)^(-d/2). D falls like a square root at θ = 0, so no straight line fits it.
 *
 * @param theta - >= 0
 * @returns in [0, 1]
 * @see Abramowitz & Stegun (1964), 26.7.3 and 26.7.4, for the distribution of t
 */
export function expectedOverlap(measure: FallMeasure, axes: Axes, theta: number): number {
	if (measure === 'warren-i') return (1 + theta) ** (-axes / 2);
	if (theta === 0) return 1;
	const cosine2 = 1 / (1 + theta);
	const sine = Math.sqrt(theta * cosine2);
	if (axes === 1) return (2 / Math.PI) * Math.atan(1 / Math.sqrt(theta));
	if (axes === 2) return cosine2 / (1 + sine);
	return (cosine2 * cosine2 * (2 + sine)) / (2 * (1 + sine) ** 2);
}

/** Beta(1/2, d/2), which scales the density of t. */
const BETA: Readonly<Record<Axes, number>> = { 1: Math.PI, 2: 2, 4: 4 / 3 };

/** How fast the expected overlap falls by ln θ: dE / d ln θ, at most 0. */
export function overlapFallRate(measure: FallMeasure, axes: Axes, theta: number): number {
	if (measure === 'warren-i') return (-axes / 2) * theta * (1 + theta) ** (-axes / 2 - 1);
	return -(Math.sqrt(theta) * (1 + theta) ** (-(axes + 1) / 2)) / BETA[axes];
}

/**
 * θ at which the expected overlap is one half. For D with one axis 1, with two 1/3; with four the root of
 * E = 1/2, found by halving. For I: 2^(2/d) - 1.
 */
export function halfOverlapTheta(measure: FallMeasure, axes: Axes): number {
	if (measure === 'warren-i') return 2 ** (2 / axes) - 1;
	let [low, high] = [0, 1];
	for (let step = 0; step < 60; step++) {
		const middle = (low + high) / 2;
		if (expectedOverlap(measure, axes, middle) > 0.5) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
