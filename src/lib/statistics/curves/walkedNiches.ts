import type { AgedTree, TreeShape } from '../agedTree.ts';
import { nextNormal, type RandomStream } from '../randomStream.ts';

/** Niche centres of the tips, in widths of the niche; shape (axes, tips), axis after axis. */
export type Centres = { readonly axes: number; readonly tipCount: number; readonly places: Float64Array };

/** Draws centres by Brownian motion along a tree: variance `rate` times elapsed age on each axis, from the root down. */
export function centreWalker({ parent, ages }: AgedTree, { tips }: TreeShape) {
	const spreads = Float64Array.from(ages, (age, node) => Math.sqrt(Math.max(0, (ages[parent[node] ?? -1] ?? age) - age)));
	const walked = new Float64Array(parent.length);

	/** @param rate - variance per unit of age, in squared widths; θ of a pair of age t is rate · t / 2 */
	return ({ axes, rate }: { axes: number; rate: number }, stream: RandomStream): Centres => {
		const places = new Float64Array(axes * tips.length);
		const scale = Math.sqrt(rate);
		for (let axis = 0; axis < axes; axis++) {
			for (let node = 1; node < walked.length; node++) {
				walked[node] = (walked[parent[node] ?? 0] ?? 0) + scale * (spreads[node] ?? 0) * nextNormal(stream);
			}
			for (let tip = 0; tip < tips.length; tip++) places[axis * tips.length + tip] = walked[tips[tip] ?? 0] ?? 0;
		}
		return { axes, tipCount: tips.length, places };
	};
}

/** Euclidean distance of two tips' centres. */
export function centreDistance({ axes, tipCount, places }: Centres, one: number, other: number): number {
	let squares = 0;
	for (let start = 0; start < axes * tipCount; start += tipCount) {
		squares += ((places[start + one] ?? 0) - (places[start + other] ?? 0)) ** 2;
	}
	return Math.sqrt(squares);
}
