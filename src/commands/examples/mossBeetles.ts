import { tipNames, type Clade } from './clade.ts';
import { independentNiches, type Niche } from './niches.ts';
import type { CollectingPlan } from './occurrences.ts';
import { randomNumbers } from './randomNumbers.ts';
import { simulateTree } from './simulateTree.ts';

/** Invented; no animal bears it. Masculine, and so are the epithets. */
const GENUS = 'Merrobryus';
const EPITHETS = [
	'angulatus',
	'brevis',
	'caliginosus',
	'densus',
	'exiguus',
	'fulvus',
	'globosus',
	'hirtus',
	'inermis',
	'latus',
	'montanus',
	'nitens',
	'ovalis',
	'pluvialis',
	'robustus',
	'scaber',
	'tectus',
	'umbrosus'
] as const;

export const MOSS_BEETLE_SEED = 86;

export const MOSS_BEETLE_TREE = {
	names: EPITHETS.map((epithet) => `${GENUS} ${epithet}`),
	rootAgeMa: 12.6,
	speciationPerMyr: 0.25,
	extinctionPerMyr: 0.07,
	smallerSide: [4, 7]
} as const;

export const MOSS_BEETLE_CENTRE_SD = 0.8;
export const MOSS_BEETLE_WIDTHS = { medianWidth: 0.6, widthLogSd: 0.25 } as const;
export const MOSS_BEETLE_COLLECTING: CollectingPlan = { fewest: 25, most: 60, radiusDegrees: [0.5, 1.4] };

export function mossBeetleTree(seed: number): Clade {
	return simulateTree(MOSS_BEETLE_TREE, randomNumbers(seed, 'moss beetle tree'));
}

export function mossBeetleNiches(seed: number, tree: Clade): Niche[] {
	return independentNiches(tipNames(tree), MOSS_BEETLE_CENTRE_SD, MOSS_BEETLE_WIDTHS, randomNumbers(seed, 'moss beetle niches'));
}
