import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { analysisLine, type AnalysisLine } from '../analysisList.server.ts';
import { askedWords } from '../planWords.ts';
import { findRenewals } from '../renewals.server.ts';
import type { Renewal } from '../renewals.ts';
import { changeReasons, changeRows, changeSummary } from './changeTable.ts';

const PENDING: readonly string[] = ['waiting', 'working'];

/** What changed in every analysis that was run again; what is still out of date; what rests on nothing that changed. */
export async function changesPage(access: Access) {
	const asked = await analyses.list(access);
	const lines = await Promise.all(asked.map((listed) => analysisLine(access, listed)));
	const pairs = (await findRenewals(access, asked)).flatMap((renewal) => pairOf(lines, renewal));
	const paired = new Set(pairs.flatMap(({ before, after }) => [before, after.id]));
	const rest = lines.filter(({ id, status }) => status === 'finished' && !paired.has(id));
	return {
		pairs,
		summary: pairs.length === 0 ? null : changeSummary(pairs),
		isPending: pairs.some(({ isOver }) => !isOver),
		stale: rest.filter(({ isOutOfDate }) => isOutOfDate).map(shortLine),
		untouched: rest.filter(({ isOutOfDate }) => !isOutOfDate).map(shortLine)
	};
}

function pairOf(lines: readonly AnalysisLine[], { before, after }: Renewal) {
	const [was, is] = [lines.find(({ id }) => id === before), lines.find(({ id }) => id === after)];
	if (was === undefined || is === undefined) return [];
	return [
		{
			before,
			after: { id: is.id, status: is.status, at: is.at, failure: is.failure, isOutOfDate: is.isOutOfDate },
			asked: askedWords(is),
			why: changeReasons(was, is),
			rows: changeRows(was, is),
			isOver: !PENDING.includes(is.status)
		}
	];
}

function shortLine(line: AnalysisLine) {
	return { id: line.id, title: line.headline?.title ?? 'Analysis', asked: askedWords(line) };
}
