import type { Station, StationState } from '#lib/contracts/station.ts';

const TITLES: Readonly<Record<Station['key'], string>> = {
	materials: 'Materials',
	names: 'Names',
	overlaps: 'Overlap runs',
	analyses: 'Analyses',
	reports: 'Reports'
};

type Standing = { readonly name: Station['key']; readonly state: StationState; readonly sentence: string };

/** The steps of a study as its margin shows them: where each stands, and the page it leads to. */
export function marginStations(study: string, standings: readonly Standing[]): Station[] {
	return standings.map(({ name, state, sentence }) => ({
		key: name,
		title: TITLES[name],
		fact: sentence,
		state,
		href: `/studies/${study}/${name}`
	}));
}
