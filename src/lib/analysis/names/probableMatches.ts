import { listNames } from '#lib/overlap/listNames.ts';
import { groupBy } from './groupBy.ts';
import type { NameRow } from './nameMatching.ts';
import { editDistance, isSwap, spellingDifference } from './spelling.ts';
import type { TidyName } from './tidyName.ts';

/** Lower is closer: 0 for a shortened genus or something added behind the name, else letters apart. */
type Likeness = { readonly rank: number; readonly reason: string };
type Candidate = Likeness & { readonly species: number; readonly tip: number };

/** Short names are all close to each other: below 6 letters no spelling counts as near, below 12 only one letter. */
const [NEAR_LENGTH, FAR_LENGTH] = [6, 12];

/**
 * Proposals for species and tips that have no namesake: a genus shortened to its first letter, something added behind
 * genus and epithet, one or two letters apart. Each needs a person's yes. Where a species or a tip is equally close to
 * several, the row is of kind `twice`.
 *
 * @returns rows for the species that are close to some tip. Cost: species × tips, with a cheap test before each comparison.
 */
export function probableMatches(species: readonly TidyName[], tips: readonly TidyName[]): NameRow[] {
	const candidates = closest(findCandidates(species, tips));
	const rivals = groupBy(candidates, ({ tip }) => tip);
	const rows: NameRow[] = [];
	for (const [index, own] of groupBy(candidates, ({ species }) => species)) {
		const [only] = own;
		const name = species[index];
		const tip = only === undefined ? undefined : tips[only.tip];
		if (name === undefined || only === undefined || tip === undefined) continue;
		const others = (rivals.get(only.tip) ?? [])
			.filter((rival) => rival.species !== index)
			.map((rival) => species[rival.species]?.raw ?? '');
		rows.push(
			own.length === 1 && others.length === 0
				? proposalRow(name, tip, only)
				: severalRow(
						name,
						own.map((c) => tips[c.tip]?.raw ?? ''),
						others
					)
		);
	}
	return rows;
}

function proposalRow(species: TidyName, tip: TidyName, { reason, rank }: Likeness): NameRow {
	const told = rank === 0 ? reason : `${reason}, and nothing else is close`;
	const differences = spellingDifference(species.raw, tip.raw);
	return { species: species.raw, tip: tip.raw, kind: 'probable', reason: told, settled: false, differences };
}

function severalRow(species: TidyName, tips: readonly string[], rivals: readonly string[]): NameRow {
	const [only] = tips;
	const close = tips.length > 1 ? `equally close to ${listNames(tips)}` : `close to ${listNames(tips)}`;
	const reason = rivals.length === 0 ? close : `${close}, as ${rivals.length === 1 ? 'is' : 'are'} ${listNames(rivals)}`;
	const tip = tips.length === 1 && only !== undefined ? { tip: only } : {};
	return { ...tip, species: species.raw, kind: 'twice', reason, settled: false, candidates: tips };
}

/** Keeps what is closest for its species and for its tip, so that a better match elsewhere rules a worse one out. */
function closest(candidates: readonly Candidate[]): Candidate[] {
	const bestOf = (side: 'species' | 'tip') => {
		const best = new Map<number, number>();
		for (const candidate of candidates)
			best.set(candidate[side], Math.min(candidate.rank, best.get(candidate[side]) ?? Infinity));
		return best;
	};
	const [bestSpecies, bestTip] = [bestOf('species'), bestOf('tip')];
	return candidates.filter(({ species, tip, rank }) => rank === bestSpecies.get(species) && rank === bestTip.get(tip));
}

function findCandidates(species: readonly TidyName[], tips: readonly TidyName[]): Candidate[] {
	const tipsByEpithet = groupBy(tips.keys(), (tip) => afterGenus(tips[tip]?.bareKey ?? ''));
	const tipsByBinomial = groupBy(tips.keys(), (tip) => binomial(tips[tip]?.bareKey ?? ''));
	const near = spellingFinder(tips.map(({ bareKey }) => bareKey));
	return species.flatMap(({ bareKey }, index): Candidate[] => {
		const akin = new Set([...(tipsByEpithet.get(afterGenus(bareKey)) ?? []), ...(tipsByBinomial.get(binomial(bareKey)) ?? [])]);
		const found = near(bareKey);
		for (const tip of akin) {
			const likeness = sameEpithet(bareKey, tips[tip]?.bareKey ?? '');
			if (likeness !== undefined) found.set(tip, likeness);
		}
		return [...found].map(([tip, likeness]) => ({ ...likeness, species: index, tip }));
	});
}

function afterGenus(key: string): string {
	return key.slice(key.indexOf(' '));
}

function binomial(key: string): string {
	return key.split(' ', 2).join(' ');
}

/** Same epithet, and the genus shortened on one side; or something behind the name on one side. */
function sameEpithet(a: string, b: string): Likeness | undefined {
	const [short, long] = a.length < b.length ? [a, b] : [b, a];
	if (long.startsWith(`${short} `) && short.includes(' ')) {
		return { rank: 0, reason: `“${long.slice(short.length + 1)}” follows the name on one side` };
	}
	const blank = short.indexOf(' ');
	const initial = short.slice(0, blank);
	if (blank < 1 || blank > 3 || (blank > 1 && !initial.endsWith('.'))) return undefined;
	const isShortened = long.startsWith(initial.replace('.', '')) && afterGenus(long) === afterGenus(short);
	return isShortened ? { rank: 0, reason: 'shortened genus' } : undefined;
}

/** For a name, the tips spelled nearly like it. Letter counts rule out most tips before any letters are compared in order. */
function spellingFinder(tips: readonly string[]): (name: string) => Map<number, Likeness> {
	const counts = tips.map(letterCounts);
	return (name) => {
		const found = new Map<number, Likeness>();
		const own = letterCounts(name);
		for (let tip = 0; tip < tips.length; tip++) {
			if (!mayBeNear(own, counts[tip] ?? own)) continue;
			const likeness = spellingLikeness(name, tips[tip] ?? '');
			if (likeness !== undefined) found.set(tip, likeness);
		}
		return found;
	};
}

function spellingLikeness(a: string, b: string): Likeness | undefined {
	const length = Math.min(a.length, b.length);
	if (length < NEAR_LENGTH) return undefined;
	const limit = length < FAR_LENGTH ? 1 : 2;
	const distance = editDistance(a, b, limit);
	if (distance > limit) return undefined;
	if (distance === 1) return { rank: 1, reason: isSwap(a, b) ? 'two letters swapped' : 'one letter apart' };
	return { rank: 2, reason: 'two letters apart' };
}

const LETTER_CLASSES = 32;

/** How often each letter stands in a name, letters 32 apart in Unicode counted together. */
function letterCounts(name: string): Uint8Array {
	const counts = new Uint8Array(LETTER_CLASSES);
	for (let i = 0; i < name.length; i++) {
		const letter = name.charCodeAt(i) % LETTER_CLASSES;
		counts[letter] = (counts[letter] ?? 0) + 1;
	}
	return counts;
}

/** One edit changes two counts by one at most, so the counts of names two edits apart differ by at most four in all. */
function mayBeNear(a: Uint8Array, b: Uint8Array): boolean {
	let difference = 0;
	for (let letter = 0; letter < LETTER_CLASSES && difference <= 4; letter++)
		difference += Math.abs((a[letter] ?? 0) - (b[letter] ?? 0));
	return difference <= 4;
}
