import type { OpeningWay, PlanContext } from '#lib/contracts/planContext.ts';
import { formatCount } from './numbers.ts';

/** Who is told: the person at the plan page, or whoever reads the report. */
type Voice = 'writer' | 'reader';

const SEEN: Readonly<Record<OpeningWay, string>> = {
	brought: 'saw this matrix when bringing it',
	page: 'opened this matrix',
	file: 'downloaded this matrix',
	script: 'read this matrix through the API'
};

/**
 * What had been seen of the matrix before the plan was written, a sentence each: by its author, by others, by an analysis.
 * Nothing is known of what was seen elsewhere, so every sentence says “here”.
 */
export function contextSentences(context: PlanContext, voice: Voice): string[] {
	return [ownSentence(context, voice), othersSentence(context), analysedSentence(context, voice)].filter((text) => text !== '');
}

function ownSentence({ opened }: PlanContext, voice: Voice): string {
	const who = voice === 'writer' ? 'You' : 'The author of the plan';
	const plan = voice === 'writer' ? 'this plan' : 'the plan';
	if (opened === null)
		return `${who} ${voice === 'writer' ? 'have' : 'had'} not opened this matrix here before ${plan} was written.`;
	return `${who} ${SEEN[opened.by]} on ${momentText(opened.at)}, before ${plan} was written.`;
}

function othersSentence({ openedByOthers: count }: PlanContext): string {
	if (count === 0) return '';
	return count === 1 ? 'One other person has seen it here.' : `${formatCount(count)} other people have seen it here.`;
}

function analysedSentence({ analysedBefore: count, lastAnalysed }: PlanContext, voice: Voice): string {
	if (count === 0) return `No analysis of it ${voice === 'writer' ? 'has' : 'had'} been run here.`;
	const last = lastAnalysed === null ? '' : `, ${count === 1 ? '' : 'the last '}on ${momentText(lastAnalysed)}`;
	return `It was analysed here before: ${count === 1 ? 'one analysis' : `${formatCount(count)} analyses`}${last}.`;
}

const MONTHS = [
	'January',
	'February',
	'March',
	'April',
	'May',
	'June',
	'July',
	'August',
	'September',
	'October',
	'November',
	'December'
];

/** “3 May 2026, 14:02 UTC”, whenever and wherever it is read. */
function momentText(iso: string): string {
	const [year = '', month = '', day = ''] = iso.slice(0, 10).split('-');
	return `${Number(day)} ${MONTHS[Number(month) - 1] ?? month} ${year}, ${iso.slice(11, 16)} UTC`;
}
