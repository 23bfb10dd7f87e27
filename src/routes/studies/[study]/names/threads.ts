import type { NameRow } from '#lib/analysis/names/nameMatching.ts';

/** How a name, or the thread between two, stands: as written or tidied, decided by a person, proposed, or without a partner. */
export type Standing = 'agrees' | 'decided' | 'proposed' | 'open' | 'left-out';

export type Thread = { readonly tip: number; readonly species: number; readonly standing: Standing };
export type Side = { readonly name: string; readonly standing: Standing };
export type Threads = { readonly tips: readonly Side[]; readonly species: readonly Side[]; readonly threads: readonly Thread[] };

type Names = { readonly tips: readonly string[]; readonly species: readonly string[] };

/** Both lists in their own order, and a thread for every pair that is used or proposed. */
export function nameThreads({ tips, species }: Names, rows: readonly NameRow[]): Threads {
	const places = { tip: placesOf(tips), species: placesOf(species) };
	const ofTips = new Array<Standing>(tips.length).fill('left-out');
	const ofSpecies = new Array<Standing>(species.length).fill('left-out');
	const threads: Thread[] = [];
	for (const row of rows) {
		const standing = standingOf(row);
		const [tip, own] = [places.tip.get(row.tip ?? ''), places.species.get(row.species ?? '')];
		// A settled claim on a tip that another species holds has no thread, and does not speak for the tip.
		const isLost = row.kind === 'twice' && row.settled && row.decision === undefined;
		if (own !== undefined) ofSpecies[own] = isLost ? 'left-out' : standing;
		if (tip !== undefined && !isLost) ofTips[tip] = standing;
		for (const candidate of row.tip === undefined ? (row.candidates ?? []) : []) {
			const place = places.tip.get(candidate);
			if (place === undefined || own === undefined) continue;
			ofTips[place] = 'proposed';
			threads.push({ tip: place, species: own, standing: 'proposed' });
		}
		if (tip !== undefined && own !== undefined && !isLost) threads.push({ tip, species: own, standing });
	}
	return {
		tips: tips.map((name, index) => ({ name, standing: ofTips[index] ?? 'left-out' })),
		species: species.map((name, index) => ({ name, standing: ofSpecies[index] ?? 'left-out' })),
		threads
	};
}

function placesOf(names: readonly string[]): ReadonlyMap<string, number> {
	return new Map(names.map((name, index) => [name, index]));
}

function standingOf({ kind, settled, decision }: NameRow): Standing {
	if (decision?.to === null) return 'left-out';
	if (decision !== undefined) return settled ? 'decided' : 'proposed';
	if (kind === 'exact' || kind === 'tidied') return 'agrees';
	if (kind === 'probable' || kind === 'twice') return settled ? 'left-out' : 'proposed';
	return settled ? 'left-out' : 'open';
}

/** A thread from left to right as a curve that leaves and arrives level. */
export function threadPath({ from, to, width }: { from: number; to: number; width: number }): string {
	const round = (value: number) => Math.round(value * 10) / 10;
	const [a, b] = [round(width * 0.42), round(width * 0.58)];
	return `M0 ${round(from)}C${a} ${round(from)} ${b} ${round(to)} ${round(width)} ${round(to)}`;
}
