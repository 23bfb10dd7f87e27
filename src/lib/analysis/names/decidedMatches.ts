import { remark, type Remark } from '#lib/remarks/remark.ts';
import { groupBy } from './groupBy.ts';
import type { NameDecision } from './nameMatching.ts';

export type Decided = {
	/** by species, the decision in force */
	readonly bySpecies: ReadonlyMap<string, NameDecision>;
	/** by tip left out, the decision in force */
	readonly byTip: ReadonlyMap<string, NameDecision>;
	/** tips that two or more species were given by decision, with these */
	readonly contested: ReadonlyMap<string, readonly string[]>;
	readonly remarks: readonly Remark[];
};

/** Sorts decisions by what they name. The last one about a name counts; one about a name that is gone is told and not used. */
export function decidedMatches(species: readonly string[], tips: readonly string[], decisions: readonly NameDecision[]): Decided {
	const [inData, inTree] = [new Set(species), new Set(tips)];
	const bySpecies = new Map<string, NameDecision>();
	const byTip = new Map<string, NameDecision>();
	const remarks: Remark[] = [];
	for (const decision of decisions) {
		const { from, to } = decision;
		const isTip = !inData.has(from) && inTree.has(from) && to === null;
		if (isTip) byTip.set(from, decision);
		else if (!inData.has(from)) remarks.push(unused(from, `“${from}” is not in the data`));
		else if (to !== null && !inTree.has(to)) remarks.push(unused(from, `the tree has no tip “${to}”`));
		else bySpecies.set(from, decision);
	}
	const taken = groupBy(bySpecies, ([, { to }]) => to);
	const contested = new Map<string, string[]>();
	for (const [tip, claims] of taken) {
		if (tip !== null && claims.length > 1)
			contested.set(
				tip,
				claims.map(([name]) => name)
			);
	}
	return { bySpecies, byTip, contested, remarks };
}

function unused(name: string, because: string): Remark {
	return remark('look', 'decision-unused', `The decision about “${name}” is kept but not used: ${because}.`, { name });
}
