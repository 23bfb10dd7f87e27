import { assertOverlap } from '../assertOverlap.ts';

/** Pairs whose ages spread less than this share of the oldest age have no slope: rounding of a tree file is about 1e-10. */
const LEAST_SPREAD = 1e-9;

/**
 * The slope over all pairs with each species left out in turn: its influence, not an interval (the spread of these
 * slopes, read as one, holds the expected slope in .75 to .79 of cases instead of .95).
 *
 * Every pair is visited twice: sums over all pairs about their means, less those of the species' own pairs. So all n
 * slopes cost about as much as one.
 *
 * @param pairAges - shape (n, n), row-major; unit of the tree
 * @param overlap - shape (n, n), row-major, the same order
 * @returns shape (n,); null where the pairs that remain are of one age
 * @throws {InputError} `non-finite`, `asymmetric`
 */
export function leaveOneOutSlopes(pairAges: Float64Array, overlap: Float64Array, count: number): (number | null)[] {
	assertOverlap(overlap, count);
	assertOverlap(pairAges, count);
	const pairs = (count * (count - 1)) / 2;
	const [meanAge, meanOverlap] = [pairAges, overlap].map((values) => sumBelow(values, count) / pairs);
	const oldest = pairAges.reduce((highest, age) => Math.max(highest, age), 0);

	const own = Array.from({ length: count }, () => ({ x: 0, y: 0, xx: 0, xy: 0 }));
	const all = { x: 0, y: 0, xx: 0, xy: 0 };
	for (const [species, sums] of own.entries()) {
		for (let other = 0; other < count; other++) {
			if (other === species) continue;
			const x = (pairAges[species * count + other] ?? 0) - (meanAge ?? 0);
			const y = (overlap[species * count + other] ?? 0) - (meanOverlap ?? 0);
			sums.x += x;
			sums.y += y;
			sums.xx += x * x;
			sums.xy += x * y;
		}
		all.x += sums.x / 2;
		all.y += sums.y / 2;
		all.xx += sums.xx / 2;
		all.xy += sums.xy / 2;
	}
	const left = pairs - (count - 1);
	return own.map(({ x, y, xx, xy }) => {
		const spread = all.xx - xx - (all.x - x) ** 2 / left;
		if (!(spread > left * (LEAST_SPREAD * oldest) ** 2)) return null;
		return (all.xy - xy - ((all.x - x) * (all.y - y)) / left) / spread;
	});
}

function sumBelow(values: Float64Array, count: number): number {
	let sum = 0;
	for (let i = 1; i < count; i++) for (let j = 0; j < i; j++) sum += values[i * count + j] ?? 0;
	return sum;
}
