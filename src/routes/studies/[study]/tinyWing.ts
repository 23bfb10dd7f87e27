/** A thumbnail never has more rows than this; neighbours in tree order are averaged beyond it. */
export const TINY_ROWS = 26;

/** Overlaps of a thumbnail: strict lower triangle, row by row, null where every pair of the block is missing. */
export type TinyWing = { readonly rows: number; readonly lower: readonly (number | null)[] };

type Matrix = { readonly species: readonly string[]; readonly lower: Float64Array };

/**
 * A small wing of a matrix in tree order. Species that the tree does not have follow at the end, in the order of the file.
 *
 * @param matrix - `lower` of shape (n(n−1)/2,): strict lower triangle, row by row; NaN where missing
 * @param order - names in tree order
 */
export function tinyWing({ species, lower }: Matrix, order: readonly string[]): TinyWing {
	const place = new Map(order.map((name, index) => [name, index]));
	const rank = (index: number) => place.get(species[index] ?? '') ?? order.length + index;
	const sorted = species.map((_, index) => index).sort((a, b) => rank(a) - rank(b));
	const rows = Math.min(TINY_ROWS, sorted.length);
	const blockOf = (position: number) => Math.floor((position * rows) / sorted.length);
	const sums = new Float64Array((rows * (rows - 1)) / 2);
	const counts = new Uint32Array(sums.length);
	for (const [high, i] of sorted.entries()) {
		for (const [low, j] of sorted.slice(0, high).entries()) {
			const [a, b] = [blockOf(high), blockOf(low)];
			const value = lower[triangle(Math.max(i, j), Math.min(i, j))] ?? Number.NaN;
			if (a === b || Number.isNaN(value)) continue;
			const at = triangle(a, b);
			sums[at] = (sums[at] ?? 0) + value;
			counts[at] = (counts[at] ?? 0) + 1;
		}
	}
	return {
		rows,
		lower: Array.from(sums, (sum, at) => (counts[at] === 0 ? null : Math.round((100 * sum) / (counts[at] ?? 1)) / 100))
	};
}

function triangle(high: number, low: number): number {
	return (high * (high - 1)) / 2 + low;
}

/** Cells of one colour together: a path for each of the six steps of the ramp, and one for what is missing. */
export function tinyWingPaths({ rows, lower }: TinyWing, pitch: number): { ramp: string[]; missing: string } {
	const ramp = Array.from({ length: 6 }, () => '');
	let missing = '';
	for (let high = 1; high < rows; high++) {
		for (let low = 0; low < high; low++) {
			const value = lower[triangle(high, low)] ?? null;
			const path = diamond({ x: (rows - (high - low)) / 2, y: (high + low + 1) / 2 }, pitch);
			if (value === null) missing += path;
			else {
				const step = Math.min(5, Math.max(0, Math.floor(value * 6)));
				ramp[step] = (ramp[step] ?? '') + path;
			}
		}
	}
	return { ramp, missing };
}

function diamond({ x, y }: { x: number; y: number }, pitch: number): string {
	const half = pitch / 2;
	const round = (value: number) => Math.round(value * 100) / 100;
	return `M${round(x * pitch)} ${round(y * pitch - half)}l${half} ${half}l${-half} ${half}l${-half} ${-half}z`;
}
