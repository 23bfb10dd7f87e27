/**
 * Sideways offsets that keep dots of one column apart: every dot takes the nearest free place, first in the middle,
 * then right, then left. The same values always give the same swarm.
 *
 * @param heights - shape (dots,); vertical places in drawing units
 * @param radius - of a dot
 * @returns offsets from the column, in the order of `heights`
 */
export function swarm(heights: readonly number[], radius: number): number[] {
	const order = [...heights.keys()].sort((a, b) => (heights[a] ?? 0) - (heights[b] ?? 0) || a - b);
	const offsets = new Array<number>(heights.length).fill(0);
	const placed: number[] = [];
	const step = radius * 1.05;
	for (const dot of order) {
		for (let attempt = 0; ; attempt++) {
			const offset = Math.ceil(attempt / 2) * (attempt % 2 === 1 ? step : -step);
			if (placed.every((other) => apart(dot, other, offset))) {
				offsets[dot] = offset === 0 ? 0 : offset;
				break;
			}
		}
		placed.push(dot);
	}
	return offsets;

	function apart(dot: number, other: number, offset: number): boolean {
		const dx = offset - (offsets[other] ?? 0);
		const dy = (heights[dot] ?? 0) - (heights[other] ?? 0);
		return dx * dx + dy * dy >= 4 * radius * radius * 0.98;
	}
}
