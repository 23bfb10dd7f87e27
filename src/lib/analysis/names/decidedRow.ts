import type { Decided } from './decidedMatches.ts';
import { firmMatches } from './firmMatches.ts';
import { listNames } from '#lib/overlap/listNames.ts';
import type { NameRow } from './nameMatching.ts';
import { probableMatches } from './probableMatches.ts';
import { tidyName } from './tidyName.ts';

/** The row of a species that a person decided about; undefined when none did. */
export function decidedRow(species: string, { bySpecies, contested }: Decided): NameRow | undefined {
	const decision = bySpecies.get(species);
	if (decision === undefined) return undefined;
	const { to } = decision;
	if (to === null) return { species, kind: 'only-in-data', reason: 'left out', settled: true, decision };
	const rivals = (contested.get(to) ?? []).filter((name) => name !== species);
	if (rivals.length > 0) {
		const reason = `${listNames(rivals)} ${rivals.length === 1 ? 'was' : 'were'} given the same tip`;
		return { species, tip: to, kind: 'twice', reason, settled: false, decision, candidates: [to] };
	}
	return { ...relation(species, to), species, tip: to, settled: true, decision };
}

/** How the two names relate by themselves, whatever a person decided. */
function relation(species: string, tip: string): Pick<NameRow, 'kind' | 'reason' | 'differences'> {
	const [ours, theirs] = [tidyName(species), tidyName(tip)];
	const [row] = [...firmMatches([ours], [theirs]).rows, ...probableMatches([ours], [theirs])];
	if (row === undefined) return { kind: 'probable', reason: 'paired by hand' };
	const { kind, reason, differences } = row;
	return differences === undefined
		? { kind, reason }
		: { kind, reason: reason.replace(', and nothing else is close', ''), differences };
}
