import { drawFrom } from './drawFrom.ts';

/** More shuffles than this fall several at a time. */
const DROPS_AT_MOST = 200_000;

/**
 * Fills a histogram the way it was filled: shuffle by shuffle, in no order of size. The order is drawn anew, because only
 * the counts are stored; however it falls, it ends in exactly these counts.
 * @param counts - shape (bins,)
 * @returns counts so far for a share from 0 to 1, which must not go back; shape (bins,)
 */
export function pourer(counts: readonly number[], seed: number): (share: number) => readonly number[] {
	const { drops, each } = dropsInOrder(counts, seed);
	const poured = new Array<number>(counts.length).fill(0);
	let fallen = 0;
	return (share) => {
		if (share >= 1) return counts;
		for (const end = Math.floor(share * drops.length); fallen < end; fallen++) {
			const bin = drops[fallen] ?? 0;
			poured[bin] = Math.min(counts[bin] ?? 0, (poured[bin] ?? 0) + each);
		}
		return [...poured];
	};
}

/** The bin that every drop falls into, shuffled, and how many shuffles are in one drop. */
function dropsInOrder(counts: readonly number[], seed: number): { drops: Uint16Array; each: number } {
	const total = counts.reduce((sum, count) => sum + count, 0);
	const each = Math.max(1, Math.ceil(total / DROPS_AT_MOST));
	const inBin = counts.map((count) => Math.ceil(count / each));
	const drops = new Uint16Array(inBin.reduce((sum, count) => sum + count, 0));
	let place = 0;
	for (const [bin, count] of inBin.entries()) {
		drops.fill(bin, place, place + count);
		place += count;
	}
	const draw = drawFrom(seed, 0);
	for (let last = drops.length - 1; last > 0; last--) {
		const other = Math.floor(draw() * (last + 1));
		const bin = drops[last] ?? 0;
		drops[last] = drops[other] ?? 0;
		drops[other] = bin;
	}
	return { drops, each };
}

/** How long the longest bar stands after a share of the shuffles: the fourth root, so that the first few can be seen. */
export function grownTo(share: number): number {
	return Math.max(0, Math.min(1, share)) ** 0.25;
}
