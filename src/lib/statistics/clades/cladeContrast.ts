/** Means of one group of species against the others. */
export type CladeContrast = {
	/** over pairs inside; null for a single species, which has none */
	readonly meanWithin: number | null;
	/** over pairs of one member and one other; null when there is no other */
	readonly meanBetween: number | null;
	readonly difference: number | null;
};

/**
 * How much more alike the members of a group are among themselves than with the others: S = mean within - mean between.
 *
 * @param overlap - shape (n, n), row-major, symmetric
 * @param members - rows of the group
 * @returns null where there are no pairs to average, never 0
 */
export function cladeContrast(overlap: Float64Array, count: number, members: Int32Array): CladeContrast {
	const inside = new Uint8Array(count);
	for (const member of members) inside[member] = 1;
	let within = 0;
	let between = 0;
	for (const member of members) {
		for (let other = 0; other < count; other++) {
			if (other === member) continue;
			const value = overlap[member * count + other] ?? Number.NaN;
			if (inside[other] === 0) between += value;
			else if (other < member) within += value;
		}
	}
	const meanWithin = meanOf(within, (members.length * (members.length - 1)) / 2);
	const meanBetween = meanOf(between, members.length * (count - members.length));
	const difference = meanWithin === null || meanBetween === null ? null : meanWithin - meanBetween;
	return { meanWithin, meanBetween, difference };
}

function meanOf(sum: number, pairs: number): number | null {
	return pairs === 0 ? null : sum / pairs;
}
