import type { NameCounts, NameRow, NameRowKind } from './nameMatching.ts';

export function nameCounts(rows: readonly NameRow[], totals: Pick<NameCounts, 'tips' | 'species' | 'pairs'>): NameCounts {
	const byKind: Record<NameRowKind, number> = {
		exact: 0,
		tidied: 0,
		probable: 0,
		'only-in-tree': 0,
		'only-in-data': 0,
		twice: 0
	};
	for (const { kind } of rows) byKind[kind] += 1;
	return { ...totals, open: rows.filter(({ settled }) => !settled).length, byKind };
}

/** The state of the names in two or three sentences: how many there are, how they agree, how many need a person. */
export function nameSentence(rows: readonly NameRow[], counts: NameCounts): string {
	const held = rows.filter(({ kind, decision }) => decision === undefined && (kind === 'exact' || kind === 'tidied'));
	const lostAuthor = held.filter(({ reason }) => reason.includes('authority')).length;
	const decided = rows.filter(({ decision }) => decision !== undefined).length;
	const parts = [agreement(held, held.length - lostAuthor)];
	if (lostAuthor > 0)
		parts.push(lostAuthor === 1 ? 'one lost its author’s name' : `${inWords(lostAuthor)} lost their authors’ names`);
	if (decided > 0) parts.push(decided === 1 ? 'one was decided by a person' : `${inWords(decided)} were decided by a person`);
	const totals = `${counted(counts.tips, 'tip', 'tips')} and ${counted(counts.species, 'species', 'species')}.`;
	return `${totals} ${capital(parts.join(', '))}. ${openWords(counts.open)}`;
}

function agreement(held: readonly NameRow[], agreeing: number): string {
	const verb = agreeing === 1 ? 'agrees' : 'agree';
	const tidied = held.filter(({ kind, reason }) => kind === 'tidied' && !reason.includes('authority'));
	if (agreeing === 0) return 'none agrees as written';
	if (tidied.length === 0) return `${inWords(agreeing)} ${verb} as written`;
	const underscores = tidied.some(({ reason }) => reason.includes('underscore'));
	return `${inWords(agreeing)} ${verb} after tidying ${underscores ? 'underscores' : 'their spelling'}`;
}

function openWords(open: number): string {
	if (open === 0) return 'Every name is settled.';
	return open === 1 ? 'One needs you.' : `${capital(inWords(open))} need you.`;
}

function counted(count: number, one: string, many: string): string {
	return `${count.toLocaleString('en')} ${count === 1 ? one : many}`;
}

const WORDS = ['none', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];

function inWords(count: number): string {
	return WORDS[count] ?? count.toLocaleString('en');
}

function capital(text: string): string {
	return text.charAt(0).toUpperCase() + text.slice(1);
}
