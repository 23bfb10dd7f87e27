import { listNames } from '#lib/overlap/listNames.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { decidedMatches, type Decided } from './decidedMatches.ts';
import { decidedRow } from './decidedRow.ts';
import { droppedNames, nameRemarks } from './droppedNames.ts';
import { firmMatches } from './firmMatches.ts';
import { groupBy } from './groupBy.ts';
import type { MatchedPair, NameDecision, NameMatching, NameRow } from './nameMatching.ts';
import { nameCounts, nameSentence } from './nameSentence.ts';
import { probableMatches } from './probableMatches.ts';
import { tidyName, type TidyName } from './tidyName.ts';

export type { NameCounts, NameDecision, NameMatching, NameRow } from './nameMatching.ts';

export type NamesToMatch = {
	/** tip labels as shown, each once */
	readonly tips: readonly string[];
	/** names in the data, each once */
	readonly species: readonly string[];
	readonly decisions: readonly NameDecision[];
};

/**
 * Relates the names of the data to the tips of the tree. Decisions come first; names that are the same, or the same after
 * tidying (underscores, blanks, quotes, capitals, authorities), hold without one; near spellings are proposed and used only
 * once a person accepts them. Two names never share a partner in silence.
 *
 * @throws {InputError} `no-shared-names` when no name is the same, near or decided
 * Cost: species × tips without a namesake, each comparison behind a cheap test; 2,000 × 2,000 takes under 2 s.
 */
export function matchNames({ tips, species, decisions }: NamesToMatch): NameMatching {
	const decided = decidedMatches(species, tips, decisions);
	const given = new Set([...decided.bySpecies.values()].flatMap(({ to }) => (to === null ? [] : [to])));
	const openSpecies = species.filter((name) => !decided.bySpecies.has(name)).map(tidyName);
	const openTips = tips.filter((name) => !given.has(name) && !decided.byTip.has(name)).map(tidyName);
	const firm = firmMatches(openSpecies, openTips);
	const late = chosenAlready(firm.species, decided);
	const lateNames = new Set(late.map((row) => row.species));
	const near = probableMatches(
		firm.species.filter(({ raw }) => !lateNames.has(raw)),
		firm.tips
	);
	const found = new Map([...firm.rows, ...late, ...near].map((row) => [row.species, row]));
	const speciesRows = species.map((name) => found.get(name) ?? decidedRow(name, decided) ?? onlyInData(name));
	const rows = withoutNamesakesLeftOut(speciesRows, tips, decided);
	refuseStrangers(rows, { tips, species, decisions });
	const pairs = pairsInUse(rows, decided);
	const dropped = droppedNames(rows, pairs);
	const counts = nameCounts(rows, { tips: tips.length, species: species.length, pairs: pairs.length });
	return { rows, pairs, dropped, counts, sentence: nameSentence(rows, counts), remarks: nameRemarks(dropped, decided) };
}

/** Species whose namesake in the tree was given to another species by decision. */
function chosenAlready(species: readonly TidyName[], { bySpecies }: Decided): NameRow[] {
	const holders = new Map(
		[...bySpecies].flatMap(([name, { to }]) => (to === null ? [] : [[tidyName(to).bareKey, { name, to }] as const]))
	);
	return species.flatMap(({ raw, bareKey }): NameRow[] => {
		const holder = holders.get(bareKey);
		if (holder === undefined) return [];
		return [{ species: raw, tip: holder.to, kind: 'twice', reason: `“${holder.name}” was chosen for this tip`, settled: true }];
	});
}

function onlyInData(species: string): NameRow {
	return { species, kind: 'only-in-data', reason: 'no close spelling in the tree', settled: false };
}

/**
 * Adds a row for each tip that no species row speaks of. A tip whose namesake was left out or given another tip by decision
 * asks nothing more.
 */
function withoutNamesakesLeftOut(rows: readonly NameRow[], tips: readonly string[], decided: Decided): NameRow[] {
	const named = new Set(rows.flatMap(({ tip, candidates = [] }) => (tip === undefined ? candidates : [tip, ...candidates])));
	const decidedByKey = groupBy(decided.bySpecies.keys(), (name) => tidyName(name).bareKey);
	const rest = tips.filter((tip) => !named.has(tip));
	const tipRows = rest.map((tip): NameRow => {
		const decision = decided.byTip.get(tip);
		if (decision !== undefined) return { tip, kind: 'only-in-tree', reason: 'left out', settled: true, decision };
		const [namesake] = decidedByKey.get(tidyName(tip).bareKey) ?? [];
		if (namesake === undefined) return { tip, kind: 'only-in-tree', reason: 'no close spelling in the data', settled: false };
		const fate = decided.bySpecies.get(namesake)?.to === null ? 'was left out' : 'was given another tip';
		return { tip, kind: 'only-in-tree', reason: `“${namesake}” ${fate}`, settled: true };
	});
	return [...rows, ...tipRows];
}

function pairsInUse(rows: readonly NameRow[], { contested }: Decided): MatchedPair[] {
	return rows.flatMap(({ species, tip, kind, decision }) => {
		if (species === undefined || tip === undefined || contested.has(tip)) return [];
		const holds = decision === undefined ? kind === 'exact' || kind === 'tidied' : decision.to === tip;
		return holds ? [{ species, tip }] : [];
	});
}

function refuseStrangers(rows: readonly NameRow[], { tips, species, decisions }: NamesToMatch): void {
	if (decisions.length > 0 || rows.some(({ species: name, tip }) => name !== undefined && tip !== undefined)) return;
	if (rows.some(({ candidates = [] }) => candidates.length > 0)) return;
	const [inTree, inData] = [tips, species].map((names) => (names.length === 0 ? 'none' : listNames(names, 3)));
	const message = `Expected the tree and the data to share species; no name is the same or near. The tree has ${tips.length} tips (${inTree}), the data ${species.length} species (${inData}). Are they of one clade?`;
	throw new InputError('no-shared-names', message);
}
