import { listNames } from '#lib/overlap/listNames.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import type { Decided } from './decidedMatches.ts';
import type { DroppedName, MatchedPair, NameRow } from './nameMatching.ts';

/** Every name that no pair uses, with why: species in the order of the rows, then tips. */
export function droppedNames(rows: readonly NameRow[], pairs: readonly MatchedPair[]): DroppedName[] {
	const usedSpecies = new Set(pairs.map(({ species }) => species));
	const usedTips = new Set(pairs.map(({ tip }) => tip));
	const species: DroppedName[] = [];
	const tips = new Map<string, DroppedName>();
	for (const row of rows) {
		const why = whyDropped(row);
		if (row.species !== undefined && !usedSpecies.has(row.species)) species.push({ name: row.species, in: 'data', why });
		for (const tip of row.tip === undefined ? (row.candidates ?? []) : [row.tip]) {
			if (!usedTips.has(tip)) tips.set(tip, { name: tip, in: 'tree', why });
		}
	}
	return [...species, ...tips.values()];
}

function whyDropped({ kind, reason, species, tip, decision, settled }: NameRow): string {
	if (decision?.to === null) return decision.why ? `left out by decision: ${decision.why}` : 'left out by decision';
	if (kind === 'only-in-data') return 'not in the tree';
	if (kind === 'only-in-tree') return settled ? reason : 'not in the data';
	if (kind === 'probable') return `“${species ?? ''}” and “${tip ?? ''}” are probably the same (${reason}); not accepted yet`;
	return settled ? reason : `${reason}; not decided yet`;
}

/** One remark for each species left out, one for all tips, one for each tip that decisions gave to several species. */
export function nameRemarks(dropped: readonly DroppedName[], decided: Decided): Remark[] {
	const species = dropped.filter((name) => name.in === 'data');
	const tips = dropped.filter((name) => name.in === 'tree').map(({ name }) => name);
	const remarks = species.map(({ name, why }) => remark('look', 'species-left-out', `“${name}” is left out: ${why}.`, { name }));
	if (tips.length > 0) {
		const are = tips.length === 1 ? 'tip of the tree is' : 'tips of the tree are';
		remarks.push(remark('look', 'tips-left-out', `${tips.length} ${are} left out: ${listNames(tips)}.`));
	}
	const contested = [...decided.contested].map(([tip, names]) => {
		const message = `The tip “${tip}” was given to ${listNames(names)}; none of them is used. Choose one.`;
		return remark('look', 'tip-claimed-twice', message, { name: tip });
	});
	return [...decided.remarks, ...contested, ...remarks];
}
