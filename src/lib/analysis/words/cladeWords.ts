import { formatCount, formatP } from './numbers.ts';

type Ways = { readonly tips: number; readonly among: number; readonly smallestP: number };

/** What no data could change: the sizes alone keep p from being small. */
export function whyNotTestable(ways: Ways & { readonly smallestAdjustedP: number; readonly clades: number }): string {
	const floor = `${chosenInWays(ways)}: p cannot be below ${numberOf(ways.smallestP)}`;
	if (ways.clades === 1) return `${floor}.`;
	const among = `for one of ${formatCount(ways.clades)} clades`;
	return `${floor}, which is ${numberOf(ways.smallestAdjustedP)} ${among}.`;
}

export function whyNotBeyond({ alpha, ...ways }: Ways & { readonly alpha: number }): string {
	const floor = `${chosenInWays(ways)} of the clade above: p cannot be below ${numberOf(ways.smallestP)}`;
	return ways.smallestP > alpha ? `${floor}.` : `${floor}, too large where so many clades are asked about.`;
}

export const BELOW_THE_ROOT = 'It stands directly below the root, so p among all species is already p beyond the clade above.';
export const NO_CLADE = 'It is no clade of this tree, so there is no one clade above it.';

function chosenInWays({ tips, among }: Ways): string {
	return `Too few ways to choose ${formatCount(tips)} of the ${formatCount(among)} species`;
}

function numberOf(p: number): string {
	return formatP(p, null).slice(2);
}

/** A declared group without a node to name it by. */
export function groupName(species: readonly string[]): string {
	if (species.length <= 3) return species.join(', ');
	return `${species.slice(0, 2).join(', ')} and ${species.length - 2} more`;
}
