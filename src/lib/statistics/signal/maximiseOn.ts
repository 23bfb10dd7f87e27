export type Maximum = { readonly at: number; readonly value: number };

/** Golden ratio less one: the share of the bracket that each step keeps. */
const KEPT = (Math.sqrt(5) - 1) / 2;
const STEPS = 60;

/**
 * The largest value of a function of one number on an interval: the best of a grid, refined by golden-section search
 * between its neighbours. Likelihoods here may have two humps; a grid of 60 has been finer than any seen.
 *
 * @param grid - ascending points to look at, both ends included
 */
export function maximiseOn(score: (at: number) => number, grid: readonly number[]): Maximum {
	let best: Maximum = { at: grid[0] ?? 0, value: Number.NEGATIVE_INFINITY };
	let bestIndex = 0;
	for (const [index, at] of grid.entries()) {
		const value = score(at);
		if (value > best.value) {
			best = { at, value };
			bestIndex = index;
		}
	}
	const refined = goldenSection(score, grid[bestIndex - 1] ?? best.at, grid[bestIndex + 1] ?? best.at);
	return refined.value > best.value ? refined : best;
}

function goldenSection(score: (at: number) => number, from: number, to: number): Maximum {
	let [low, high] = [from, to];
	let left = high - KEPT * (high - low);
	let right = low + KEPT * (high - low);
	let [atLeft, atRight] = [score(left), score(right)];
	for (let step = 0; step < STEPS; step++) {
		if (atLeft >= atRight) {
			[high, right, atRight] = [right, left, atLeft];
			left = high - KEPT * (high - low);
			atLeft = score(left);
		} else {
			[low, left, atLeft] = [left, right, atRight];
			right = low + KEPT * (high - low);
			atRight = score(right);
		}
	}
	return atLeft >= atRight ? { at: left, value: atLeft } : { at: right, value: atRight };
}

/** `count` points from `from` to `to`, evenly spaced, or by equal ratios when `byRatio` (both ends then > 0). */
export function gridOf({
	from,
	to,
	count,
	byRatio = false
}: {
	from: number;
	to: number;
	count: number;
	byRatio?: boolean;
}): number[] {
	const share = (step: number) => step / (count - 1);
	return Array.from({ length: count }, (_, step) =>
		byRatio ? from * (to / from) ** share(step) : from + (to - from) * share(step)
	);
}
