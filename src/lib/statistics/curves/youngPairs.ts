/** The share of nodes that count as young. */
const YOUNG_SHARE = 1 / 3;

/** Slots of the youngest third of the nodes, at least one; nodes as old as the last of them belong to it. */
export function youngSlots(ages: Float64Array): number[] {
	const sorted = Float64Array.from(ages).sort();
	const count = Math.max(1, Math.floor(ages.length * YOUNG_SHARE));
	const oldest = sorted[count - 1] ?? 0;
	return Array.from(ages.keys()).filter((slot) => (ages[slot] ?? 0) <= oldest);
}

type Residuals = { readonly means: Float64Array; readonly curve: Float64Array; readonly pairs: Float64Array };

/** Mean over the pairs that meet at some nodes of overlap less the curve. */
export function youngResidual(slots: readonly number[], { means, curve, pairs }: Residuals): number {
	let [sum, count] = [0, 0];
	for (const slot of slots) {
		sum += (pairs[slot] ?? 0) * ((means[slot] ?? 0) - (curve[slot] ?? 0));
		count += pairs[slot] ?? 0;
	}
	return sum / count;
}
