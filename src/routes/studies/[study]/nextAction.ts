import type { Station } from '#lib/contracts/station.ts';

export type NextAction = { readonly text: string; readonly href: string };

const NEEDS: Readonly<Record<Station['key'], string>> = {
	materials: 'Settle the materials',
	names: 'Settle the names',
	overlaps: 'Look at the overlap run',
	analyses: 'Look at the analysis',
	reports: 'Look at the report'
};

const START: Readonly<Record<Station['key'], string>> = {
	materials: 'Paste a tree',
	names: 'Compare the names',
	overlaps: 'Add a matrix',
	analyses: 'Plan the test',
	reports: 'Save a report'
};

type Standing = Pick<Station, 'key' | 'state' | 'href'>;

/**
 * The one thing to do next: the first step that needs somebody, is out of date or has not begun. Null when all is ready.
 * @param newestFinished - id of the newest finished analysis: a report is saved from it
 */
export function nextAction(stations: readonly Standing[], newestFinished: string | null): NextAction | null {
	const station = stations.find(({ state }) => state !== 'ready');
	if (station === undefined) return null;
	const { key, state, href } = station;
	if (state === 'out-of-date') return { text: 'See what changed', href };
	if (state === 'needs-you') return { text: NEEDS[key], href };
	// A matrix is a material; it is brought where the tree was brought.
	if (key === 'overlaps' || key === 'names') return { text: START.overlaps, href: href.replace(/[^/]+$/, 'materials') };
	if (key === 'reports' && newestFinished !== null)
		return { text: START.reports, href: href.replace(/[^/]+$/, `analyses/${newestFinished}`) };
	return { text: START[key], href: key === 'analyses' ? `${href}/new` : href };
}
