/**
 * Holm's step-down adjustment: valid whatever the dependence of the tests.
 *
 * @param pValues - each in [0, 1]
 * @returns shape as given: the smallest family-wise level at which each would be rejected
 * @see Holm (1979) Scand. J. Stat. 6:65
 */
export function holm(pValues: readonly number[]): number[] {
	const order = [...pValues.keys()].sort((a, b) => (pValues[a] ?? 0) - (pValues[b] ?? 0));
	const adjusted = new Array<number>(pValues.length).fill(0);
	let largest = 0;
	for (const [rank, index] of order.entries()) {
		largest = Math.max(largest, Math.min(1, (pValues.length - rank) * (pValues[index] ?? 0)));
		adjusted[index] = largest;
	}
	return adjusted;
}
