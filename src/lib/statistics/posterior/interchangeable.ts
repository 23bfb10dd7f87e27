/** Weights closer than this share of the largest are equal: far above the rounding of a mean over 10,000 trees. */
const SAME_WEIGHT = 1e-9;

/**
 * Natural logarithm of the number of ways to let species change places, within their sides, so that no pair's weight
 * changes: the product of the factorials of the sets of species that are alike. Two are alike when their weights with
 * every other species are the same, as in a cherry that all trees hold.
 *
 * Limit: counts exchanges of single species, not of whole clades that mirror each other.
 *
 * @param weights - shape (n, n), row-major, symmetric
 * @param sideOf - shape (n,); side of each species
 */
export function lnInterchangeable(weights: Float64Array, sideOf: Int32Array): number {
	const n = sideOf.length;
	const tolerance = SAME_WEIGHT * weights.reduce((largest, weight) => Math.max(largest, Math.abs(weight)), 0);
	const seen = new Uint8Array(n);
	let sum = 0;
	for (let one = 0; one < n; one++) {
		if (seen[one] === 1) continue;
		let alike = 1;
		for (let other = one + 1; other < n; other++) {
			if (sideOf[one] !== sideOf[other] || !areAlike(weights, n, { one, other, tolerance })) continue;
			seen[other] = 1;
			sum += Math.log(++alike);
		}
	}
	return sum;
}

type Two = { readonly one: number; readonly other: number; readonly tolerance: number };

function areAlike(weights: Float64Array, n: number, { one, other, tolerance }: Two): boolean {
	for (let third = 0; third < n; third++) {
		if (third === one || third === other) continue;
		const difference = (weights[one * n + third] ?? 0) - (weights[other * n + third] ?? 0);
		if (Math.abs(difference) > tolerance) return false;
	}
	return true;
}
