import type { Clade } from './clade.ts';
import { inheritedNiches, type Niche } from './niches.ts';
import type { CollectingPlan } from './occurrences.ts';
import { randomNumbers } from './randomNumbers.ts';
import { simulateTree } from './simulateTree.ts';
import { uncertainTrees, type DatingPlan } from './uncertainTrees.ts';

/** Invented; no animal bears it. Feminine, like *rana*, so that the epithets are. */
const GENUS = 'Lychnorana';
const EPITHETS = [
	'alpestris',
	'arida',
	'borealis',
	'cinerea',
	'fluvialis',
	'glauca',
	'gracilis',
	'humilis',
	'lateralis',
	'lucens',
	'minor',
	'mirabilis',
	'nimbosa',
	'obscura',
	'pallida',
	'rufula',
	'saxatilis',
	'sericea',
	'sonora',
	'tarda',
	'tenebrosa',
	'tumida',
	'umbrina',
	'velata',
	'vestita',
	'viridula'
] as const;

export const LANTERNFROG_SEED = 617;

export const LANTERNFROG_TREE = {
	names: EPITHETS.map((epithet) => `${GENUS} ${epithet}`),
	rootAgeMa: 18.4,
	speciationPerMyr: 0.2,
	extinctionPerMyr: 0.06,
	smallerSide: [4, 10]
} as const;

/** Variance per Myr of each standardised centre: over the 18.4 Myr of the tree a standard deviation of 0.8. */
export const LANTERNFROG_VARIANCE_PER_MYR = 0.035;
export const LANTERNFROG_WIDTHS = { medianWidth: 0.6, widthLogSd: 0.25 } as const;
export const LANTERNFROG_COLLECTING: CollectingPlan = { fewest: 30, most: 90, radiusDegrees: [0.7, 1.8] };
export const LANTERNFROG_DATING: DatingPlan = {
	count: 200,
	rootLogSd: 0.0554,
	nodeLogSd: 0.12,
	rearrangedShare: 0.08,
	shortBranchMyr: 1
};

export function lanternfrogTree(seed: number): Clade {
	return simulateTree(LANTERNFROG_TREE, randomNumbers(seed, 'lanternfrog tree'));
}

export function lanternfrogNiches(seed: number, tree: Clade): Niche[] {
	return inheritedNiches(tree, LANTERNFROG_VARIANCE_PER_MYR, LANTERNFROG_WIDTHS, randomNumbers(seed, 'lanternfrog niches'));
}

export function lanternfrogPosterior(seed: number, tree: Clade): Clade[] {
	return uncertainTrees(tree, LANTERNFROG_DATING, randomNumbers(seed, 'lanternfrog dating'));
}
