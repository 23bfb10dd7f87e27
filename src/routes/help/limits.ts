import { PERMUTATION_LIMIT } from '#lib/contracts/plan.ts';
import { SPECIES_LIMIT } from '#lib/overlap/matrixReading.ts';
import { TIP_LIMIT, TREE_LIMIT } from '#lib/phylogeny/treeLimits.ts';

const count = (value: number) => value.toLocaleString('en');

/** What the program states and keeps. The figures come from where they are enforced, so the page cannot fall behind. */
export const LIMITS: readonly { readonly what: string; readonly limit: string }[] = [
	{ what: 'One tree text', limit: `64 MiB and ${count(TREE_LIMIT)} trees` },
	{ what: 'One tree', limit: `${count(TIP_LIMIT)} tips, any depth` },
	{ what: 'A matrix or an analysis', limit: `${count(SPECIES_LIMIT)} species; at least 4 shared by tree and matrix` },
	{ what: 'Shuffles of one analysis', limit: count(PERMUTATION_LIMIT) }
];
