import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { TreesBlock } from '#lib/contracts/resultBlocks.ts';
import { formatCount, formatShare, formatSlope } from './numbers.ts';
import { unitWords } from './units.ts';

/** What the lines of all trees say together: how far the dating moves the slope. */
export function treeSentence({ count, slopes, shareBelow }: TreesBlock, ageUnit: AgeUnit): string {
	const at = (probability: number) => formatSlope(slopes.quantiles.find(([p]) => p === probability)?.[1] ?? slopes.mean);
	const falling =
		shareBelow === 1
			? 'overlap falls with age in every tree'
			: shareBelow === 0
				? 'overlap falls with age in no tree'
				: `overlap falls with age in ${formatShare(shareBelow)} of the trees`;
	return (
		`Over ${formatCount(count)} trees the slope has a median of ${at(0.5)} ${unitWords(ageUnit).per}, ` +
		`and the middle 95 % of the trees lie from ${at(0.025)} to ${at(0.975)}; ${falling}. ` +
		'The p of the finding is that of the statistic averaged over all of them.'
	);
}

/** What stands beside the trees wherever they are told. */
export const TREES_CAUTION =
	'This is sensitivity to the dating, not probability: the share of trees in which overlap falls is not the probability that it does, ' +
	'and trees of one sample are no replicates. No single tree has a p of its own here. Node averages, age classes, clades, covariates, ' +
	'signal and simulations on this page are of the one tree that is drawn.';
