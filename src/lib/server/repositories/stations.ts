import type { Access } from '#lib/server/access.ts';
import * as analyses from './analyses.ts';
import * as names from './names.ts';
import * as overlapRuns from './overlapRuns.ts';
import * as reports from './reports.ts';
import * as treeSets from './treeSets.ts';

export const STATION_NAMES = ['materials', 'names', 'overlaps', 'analyses', 'reports'] as const;
export type StationName = (typeof STATION_NAMES)[number];
export type StationState = 'not-started' | 'needs-you' | 'ready' | 'out-of-date';

export type Station = {
	readonly name: StationName;
	readonly state: StationState;
	/** what stands there, in one short sentence */
	readonly sentence: string;
};

type Standing = { readonly state: StationState; readonly sentence: string };

/** Where the study stands, step by step. */
export async function stations(access: Access): Promise<Station[]> {
	const [trees, runs, asked, saved, matching] = [
		await treeSets.list(access),
		await overlapRuns.list(access),
		await analyses.list(access),
		await reports.list(access),
		await names.matching(access)
	];
	const newest = asked[0];
	const changes = newest === undefined ? [] : await analyses.outOfDate(access, newest);
	const standing: Record<StationName, Standing> = {
		materials: materialsStanding(trees, runs),
		names: namesStanding(matching),
		overlaps: overlapsStanding(runs),
		analyses: analysesStanding(asked, changes),
		reports: reportsStanding(saved)
	};
	return STATION_NAMES.map((name) => ({ name, ...standing[name] }));
}

type Remarked = { readonly remarks: readonly { readonly level: string }[] };

const countOf = (count: number, one: string, many: string) => (count === 1 ? `1 ${one}` : `${count} ${many}`);
const openRemarks = (materials: readonly Remarked[]) =>
	materials.flatMap((material) => material.remarks).filter((remark) => remark.level === 'settle').length;

function materialsStanding(trees: readonly Remarked[], runs: readonly Remarked[]): Standing {
	if (trees.length + runs.length === 0) return { state: 'not-started', sentence: 'No tree and no matrix yet.' };
	if (trees.length === 0) return { state: 'needs-you', sentence: 'A tree is missing.' };
	if (runs.length === 0) return { state: 'needs-you', sentence: 'A matrix of overlaps is missing.' };
	const open = openRemarks([...trees.slice(0, 1), ...runs.slice(0, 1)]);
	if (open > 0) return { state: 'needs-you', sentence: `${countOf(open, 'remark', 'remarks')} to settle.` };
	return {
		state: 'ready',
		sentence: `${countOf(trees.length, 'tree set', 'tree sets')}, ${countOf(runs.length, 'matrix', 'matrices')}.`
	};
}

function namesStanding(matching: Awaited<ReturnType<typeof names.matching>>): Standing {
	if (matching === null) return { state: 'not-started', sentence: 'Names are compared once tree and matrix are there.' };
	const open = matching.rows.filter((row) => !row.settled).length;
	if (open > 0) return { state: 'needs-you', sentence: `${countOf(open, 'name', 'names')} to decide.` };
	return { state: 'ready', sentence: `${countOf(matching.pairs.length, 'species agrees', 'species agree')}.` };
}

function overlapsStanding(runs: readonly Remarked[]): Standing {
	if (runs.length === 0) return { state: 'not-started', sentence: 'No overlap run yet.' };
	if (openRemarks(runs.slice(0, 1)) > 0) return { state: 'needs-you', sentence: 'The newest run has a remark to settle.' };
	return { state: 'ready', sentence: `${countOf(runs.length, 'overlap run', 'overlap runs')}.` };
}

function analysesStanding(asked: readonly analyses.ListedAnalysis[], changes: readonly { message: string }[]): Standing {
	const newest = asked[0];
	if (newest === undefined) return { state: 'not-started', sentence: 'Nothing has been tested yet.' };
	if (newest.status === 'failed') return { state: 'needs-you', sentence: 'The newest analysis failed.' };
	if (changes[0] !== undefined) return { state: 'out-of-date', sentence: changes[0].message };
	if (newest.status === 'finished')
		return { state: 'ready', sentence: newest.headline?.title ?? 'The newest analysis has finished.' };
	return {
		state: 'needs-you',
		sentence: newest.status === 'stopped' ? 'The newest analysis was stopped.' : 'An analysis is under way.'
	};
}

function reportsStanding(saved: readonly unknown[]): Standing {
	if (saved.length === 0) return { state: 'not-started', sentence: 'No report saved yet.' };
	return { state: 'ready', sentence: `${countOf(saved.length, 'report', 'reports')}.` };
}
