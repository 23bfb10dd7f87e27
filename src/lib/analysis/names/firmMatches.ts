import { groupBy } from './groupBy.ts';
import type { NameRow } from './nameMatching.ts';
import { isSameAuthority, tidyingWords, type TidyName } from './tidyName.ts';

export type FirmMatches = {
	/** one row for each species that has a namesake in the tree */
	readonly rows: readonly NameRow[];
	/** without a namesake on the other side */
	readonly species: readonly TidyName[];
	readonly tips: readonly TidyName[];
};

/**
 * Pairs species with tips of the same name after tidying. One species and one tip hold without a decision; several of
 * either give rows of kind `twice`, for a person to choose; two names with different authorities are only probably the same.
 */
export function firmMatches(species: readonly TidyName[], tips: readonly TidyName[]): FirmMatches {
	const speciesByKey = groupBy(species, ({ bareKey }) => bareKey);
	const tipsByKey = groupBy(tips, ({ bareKey }) => bareKey);
	const rows: NameRow[] = [];
	for (const [key, ours] of speciesByKey) {
		const theirs = tipsByKey.get(key);
		if (theirs !== undefined) rows.push(...namesakeRows(ours, theirs));
	}
	return {
		rows,
		species: species.filter(({ bareKey }) => !tipsByKey.has(bareKey)),
		tips: tips.filter(({ bareKey }) => !speciesByKey.has(bareKey))
	};
}

function namesakeRows(species: readonly TidyName[], tips: readonly TidyName[]): NameRow[] {
	const pairs = species.map((ours) => ({ ours, theirs: tips.filter(({ key }) => key === ours.key) }));
	const keysDiffer = new Set(species.map(({ key }) => key)).size === species.length;
	const isOneToOne = keysDiffer && species.length === tips.length && pairs.every(({ theirs }) => theirs.length === 1);
	if (isOneToOne) return pairs.flatMap(({ ours, theirs }) => theirs.map((tip) => pairRow(ours, tip)));
	const [first, tip] = [species[0], tips[0]];
	if (species.length === 1 && tips.length === 1 && first !== undefined && tip !== undefined) return [pairRow(first, tip)];
	return species.map((ours) => twiceRow(ours, species, tips));
}

function pairRow(species: TidyName, tip: TidyName): NameRow {
	const both = { species: species.raw, tip: tip.raw };
	if (species.raw === tip.raw) return { ...both, kind: 'exact', reason: 'the same', settled: true };
	const differ = species.authority !== '' && tip.authority !== '' && !isSameAuthority(species.authority, tip.authority);
	if (!differ) return { ...both, kind: 'tidied', reason: tidyingWords(species, tip), settled: true };
	const reason = `different authorities: “${species.authority}”, “${tip.authority}”`;
	return { ...both, kind: 'probable', reason, settled: false };
}

function twiceRow(ours: TidyName, species: readonly TidyName[], tips: readonly TidyName[]): NameRow {
	const others = species.filter((name) => name !== ours).map(({ raw }) => `“${raw}”`);
	const several = tips.length > 1 ? `${tips.length} tips have this name` : '';
	const rivals = others.length > 0 ? `${others.join(', ')} would take the same tip` : '';
	const reason = [several, rivals].filter((part) => part !== '').join('; ');
	return { ...oneTip(tips), species: ours.raw, kind: 'twice', reason, settled: false, candidates: tips.map(({ raw }) => raw) };
}

function oneTip(tips: readonly TidyName[]): { tip?: string } {
	const [only, ...more] = tips;
	return only === undefined || more.length > 0 ? {} : { tip: only.raw };
}
