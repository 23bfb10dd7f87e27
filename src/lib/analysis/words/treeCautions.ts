import type { Finding } from '#lib/contracts/analysisResult.ts';
import type { FindingFacts } from './findingFacts.ts';
import { formatCount, formatShare } from './numbers.ts';

type Caution = Finding['cautions'][number];
type Rule = (facts: FindingFacts) => Caution | null;

/** Trees that describe what a dating leaves open. Common practice: 100 to 1,000. */
const FEWEST_TREES = 100;
/** Below this share of trees, or above its complement, a slope of the other sign is no rarity. */
const CLEAR_SHARE = 0.975;
const CLEAR_SPLIT = 0.95;

const rules: readonly Rule[] = [
	({ trees, treesInSet = 1 }) =>
		trees === undefined && treesInSet > 1
			? {
					code: 'posterior-ignored',
					message: `One of ${formatCount(treesInSet)} trees was used: what the dating leaves open is not in this p. Test over all of them.`
				}
			: null,
	({ trees }) =>
		trees !== undefined && Math.max(trees.shareBelow, 1 - trees.shareBelow) < CLEAR_SHARE
			? {
					code: 'trees-disagree',
					message: `Overlap falls with age in ${formatShare(trees.shareBelow)} of the trees and rises in the others: the direction depends on the dating.`
				}
			: null,
	({ trees }) =>
		trees !== undefined && trees.deepestSplit.share < CLEAR_SPLIT
			? {
					code: 'root-unsure',
					message: `The commonest root split is that of ${formatShare(trees.deepestSplit.share)} of the trees. The test within the deepest split keeps to it in all of them.`
				}
			: null,
	({ trees }) =>
		trees !== undefined && trees.count < FEWEST_TREES
			? {
					code: 'few-trees',
					message: `${formatCount(trees.count)} trees are few to show what a dating leaves open; ${FEWEST_TREES} or more are usual. The p itself is exact for any number.`
				}
			: null
];

/** Pitfalls of one tree among many, or of many. */
export function treeCautions(facts: FindingFacts): Caution[] {
	return rules.map((rule) => rule(facts)).filter((caution) => caution !== null);
}
