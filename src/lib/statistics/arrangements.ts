import { nextBelow, type RandomStream } from './randomStream.ts';

/** Neighbouring positions whose species may change places among themselves: from `from` up to, not including, `to`. */
export type Group = { readonly from: number; readonly to: number };

/** The arrangement in which species i stands at position i. */
export function identityArrangement(length: number): Int32Array {
	return Int32Array.from({ length }, (_, i) => i);
}

/**
 * Shuffles the entries from `from` up to, not including, `to`: every order equally likely, whatever the order before.
 * @see Durstenfeld (1964), doi:10.1145/364520.364540, algorithm 235
 */
export function shuffleInPlace(arrangement: Int32Array, stream: RandomStream, { from, to }: Group): void {
	for (let last = to - 1; last > from; last--) {
		const chosen = from + nextBelow(stream, last - from + 1);
		const moved = arrangement[last] ?? 0;
		arrangement[last] = arrangement[chosen] ?? 0;
		arrangement[chosen] = moved;
	}
}

/**
 * Moves to the next arrangement of the groups in lexicographic order, the last group turning fastest. Begun at the
 * identity, it visits every product of the groups' orders once.
 *
 * @returns false when all have been visited; the arrangement is then the identity again
 */
export function nextArrangementInPlace(arrangement: Int32Array, groups: readonly Group[]): boolean {
	for (let g = groups.length - 1; g >= 0; g--) {
		const group = groups[g];
		if (group && nextOrderInPlace(arrangement, group)) return true;
	}
	return false;
}

/** Natural logarithm of the number of arrangements of the groups, the product of their factorials. */
export function lnArrangementCount(groups: readonly Group[]): number {
	let sum = 0;
	for (const { from, to } of groups) for (let k = 2; k <= to - from; k++) sum += Math.log(k);
	return sum;
}

/** Number of arrangements of the groups; Infinity beyond the range of a double. */
export function arrangementCount(groups: readonly Group[]): number {
	let product = 1;
	for (const { from, to } of groups) for (let k = 2; k <= to - from; k++) product *= k;
	return product;
}

/** One group to its next order; back to ascending, and false, after the last. */
function nextOrderInPlace(arrangement: Int32Array, { from, to }: Group): boolean {
	let pivot = to - 2;
	while (pivot >= from && (arrangement[pivot] ?? 0) > (arrangement[pivot + 1] ?? 0)) pivot--;
	if (pivot >= from) {
		const small = arrangement[pivot] ?? 0;
		let next = to - 1;
		while ((arrangement[next] ?? 0) < small) next--;
		arrangement[pivot] = arrangement[next] ?? 0;
		arrangement[next] = small;
	}
	arrangement.subarray(Math.max(pivot + 1, from), to).reverse();
	return pivot >= from;
}
