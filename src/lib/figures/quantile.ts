/** Quantile of the values by linear interpolation between order statistics; NaN without values. */
export function quantile(values: readonly number[], share: number): number {
	const sorted = [...values].sort((a, b) => a - b);
	const place = share * (sorted.length - 1);
	const lower = sorted[Math.floor(place)] ?? Number.NaN;
	const upper = sorted[Math.ceil(place)] ?? lower;
	return lower + (upper - lower) * (place - Math.floor(place));
}

export function median(values: readonly number[]): number {
	return quantile(values, 0.5);
}
