import { formatCount, formatSlope } from '#lib/analysis/words/numbers.ts';
import { type DrawnP, moreShuffles } from '#lib/statistics/moreShuffles.ts';

export type Offer = { readonly why: string; readonly shuffles: number };

/** What more shuffles could settle, in a sentence; null where these have settled it. */
export function moreShufflesOffer(permutation: DrawnP, alpha: number): Offer | null {
	const shuffles = moreShuffles(permutation, alpha);
	if (shuffles === null || permutation.interval === null) return null;
	const count = formatCount(permutation.count);
	if (permutation.asExtreme === 0)
		return { shuffles, why: `None of ${count} shuffles was as extreme: p is as small as they can tell.` };
	const [from, to] = permutation.interval;
	const interval = `${formatSlope(from, 2)} to ${formatSlope(to, 2)}`;
	return { shuffles, why: `${count} shuffles leave p open around the level ${alpha}: its 95 % interval is ${interval}.` };
}
