import type { NameRow } from '#lib/analysis/names/nameMatching.ts';
import type { SpellingDifference } from '#lib/analysis/names/spelling.ts';

/** One thing that asks for a person: a proposal, a claim too many, or names without a partner. */
export type OpenName = {
	readonly key: string;
	readonly kind: 'probable' | 'twice' | 'pair-left-over' | 'only-in-data' | 'only-in-tree';
	readonly species: string | null;
	/** one tip, or the several that are meant together */
	readonly tips: readonly string[];
	readonly reason: string;
	/** where the two spellings differ, for underlining */
	readonly differences: SpellingDifference | null;
	/** a decision that stands already and is in the way */
	readonly isDecided: boolean;
};

const ORDER: readonly OpenName['kind'][] = ['probable', 'twice', 'pair-left-over', 'only-in-data', 'only-in-tree'];

/**
 * What needs a person, the easiest first. One species and one tip that are left over stand together, so that they can be
 * paired at once; tips without a species are one line however many they are, as a tree often holds more than the data.
 */
export function openNames(rows: readonly NameRow[]): OpenName[] {
	const open = rows.filter(({ settled }) => !settled);
	const inData = open.filter(({ kind }) => kind === 'only-in-data');
	const inTree = open.filter(({ kind }) => kind === 'only-in-tree').map(({ tip = '' }) => tip);
	const others = open.filter(({ kind }) => kind !== 'only-in-data' && kind !== 'only-in-tree').map(asOpen);
	const leftOver = inData.length === 1 && inTree.length === 1 ? [pairLeftOver(inData[0]?.species ?? '', inTree)] : [];
	const apart = leftOver.length > 0 ? [] : [...inData.map(asOpen), ...(inTree.length > 0 ? [onlyInTree(inTree)] : [])];
	return [...others, ...leftOver, ...apart].sort((a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind));
}

function asOpen({ species, tip, candidates, kind, reason, differences, decision }: NameRow): OpenName {
	const tips = candidates ?? (tip === undefined ? [] : [tip]);
	const open = kind === 'probable' || kind === 'only-in-data' ? kind : 'twice';
	return {
		key: `species ${species ?? ''}`,
		kind: open,
		species: species ?? null,
		tips,
		reason,
		differences: differences ?? null,
		isDecided: decision !== undefined
	};
}

function pairLeftOver(species: string, tips: readonly string[]): OpenName {
	return {
		key: `species ${species}`,
		kind: 'pair-left-over',
		species,
		tips,
		reason: 'they share no close spelling',
		differences: null,
		isDecided: false
	};
}

function onlyInTree(tips: readonly string[]): OpenName {
	return {
		key: 'tips',
		kind: 'only-in-tree',
		species: null,
		tips,
		reason: 'no close spelling in the data',
		differences: null,
		isDecided: false
	};
}
