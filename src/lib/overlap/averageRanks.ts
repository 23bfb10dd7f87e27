/**
 * Ranks from 1, equal values sharing the mean of their ranks.
 * @param values - shape (n,); finite
 * @returns shape (n,); ranks in [1, n]. Cost: n log n.
 */
export function averageRanks(values: ArrayLike<number>): Float64Array {
	const order = Uint32Array.from({ length: values.length }, (_, index) => index);
	order.sort((a, b) => (values[a] ?? 0) - (values[b] ?? 0));
	const ranks = new Float64Array(values.length);
	let start = 0;
	while (start < order.length) {
		let end = start + 1;
		while (end < order.length && values[order[end] ?? 0] === values[order[start] ?? 0]) end += 1;
		for (let k = start; k < end; k++) ranks[order[k] ?? 0] = (start + 1 + end) / 2;
		start = end;
	}
	return ranks;
}
