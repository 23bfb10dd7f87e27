import type { HeadlineWords } from '#lib/analysis/words/headlineWords.ts';
import { formatCount } from '#lib/analysis/words/numbers.ts';
import type { Plan } from '#lib/contracts/plan.ts';

/** What is needed of an analysis to tell it from the same one on other materials. */
export type Told = {
	readonly treeSetId: string;
	readonly overlapRunId: string;
	readonly tree: { readonly label: string };
	readonly run: { readonly label: string };
	readonly plan: Pick<Plan, 'covariates' | 'signal'>;
	readonly decisions: readonly { readonly from: string; readonly to: string | null }[];
	readonly headline: { readonly title: string; readonly species: number } | null;
	readonly figures: HeadlineWords | null;
};

type ChangeRow = {
	readonly term: string;
	readonly before: string;
	/** null where it is as before */
	readonly now: string | null;
};

/** Finding, slope, p, p within the deepest split and species of two runs of one plan; empty until both have a result. */
export function changeRows(before: Told, after: Told): ChangeRow[] {
	const [was, is] = [factsOf(before), factsOf(after)];
	if (was === null || is === null) return [];
	return was.map(([term, text], index) => {
		const now = is[index]?.[1] ?? text;
		return { term, before: text, now: now === text ? null : now };
	});
}

function factsOf({ headline, figures }: Told): (readonly [term: string, text: string])[] | null {
	if (headline === null || figures === null) return null;
	return [
		['Finding', headline.title],
		['Slope', figures.slope],
		['p', bare(figures.p)],
		['p within the deepest split', bare(figures.within)],
		['Species', formatCount(headline.species)]
	];
}

/** In a column headed p the sign of equality says nothing. */
const bare = (p: string) => p.replace(/^= /, '');

/** What changed between two runs of one plan, a sentence each. */
export function changeReasons(before: Told, after: Told): string[] {
	const reasons = [
		before.treeSetId === after.treeSetId ? '' : replacedWords('tree', before.tree.label, after.tree.label),
		before.overlapRunId === after.overlapRunId ? '' : replacedWords('matrix', before.run.label, after.run.label),
		otherMaterials(before, after),
		nameWords(before, after)
	].filter((reason) => reason !== '');
	return reasons.length > 0
		? reasons
		: ['A remark about the tree or the matrix was settled, or what is known of the tree was told, in another way.'];
}

function replacedWords(what: string, before: string, after: string): string {
	return before === after ? `The ${what} “${before}” was replaced.` : `The ${what} “${before}” was replaced by “${after}”.`;
}

function otherMaterials({ plan: before }: Told, { plan: after }: Told): string {
	if (before.covariates.join() !== after.covariates.join()) return 'A covariate was replaced.';
	return before.signal?.table === after.signal?.table ? '' : 'The table of niche positions was replaced.';
}

function nameWords({ decisions: before }: Told, { decisions: after }: Told): string {
	const keyOf = ({ from, to }: Told['decisions'][number]) => JSON.stringify([from, to]);
	const [was, is] = [new Set(before.map(keyOf)), new Set(after.map(keyOf))];
	const changed = new Set(
		[...before.filter((one) => !is.has(keyOf(one))), ...after.filter((one) => !was.has(keyOf(one)))].map(({ from }) => from)
	);
	if (changed.size === 0) return '';
	return changed.size === 1 ? 'One decision about a name changed.' : `${changed.size} decisions about names changed.`;
}

type Changed = { readonly rows: readonly ChangeRow[]; /** it does not wait or work any more */ readonly isOver: boolean };

/** How many of the analyses that were run again find the same, in one sentence. */
export function changeSummary(pairs: readonly Changed[]): string {
	const done = pairs.filter(({ rows }) => rows.length > 0);
	const other = done.filter(({ rows }) => rows[0]?.now !== null).length;
	const same = done.filter(({ rows }) => rows.every(({ now }) => now === null)).length;
	const pending = pairs.filter(({ isOver }) => !isOver).length;
	const moved = done.length - other - same;
	if (pairs.length === 1 && pairs[0] !== undefined) return `One analysis was run again; it ${onlyOne(pairs[0])}.`;
	const parts = [
		[other, 'now finds something else', 'now find something else'],
		[moved, 'finds the same with other numbers', 'find the same with other numbers'],
		[same, 'gives the same to the last digit shown', 'give the same to the last digit shown'],
		[pairs.length - done.length - pending, 'ended without a result', 'ended without a result'],
		[pending, 'is still under way', 'are still under way']
	] as const;
	const told = parts.flatMap(([count, one, many]) => (count === 0 ? [] : [`${count} ${count === 1 ? one : many}`]));
	return `${pairs.length} analyses were run again: ${told.join(', ')}.`;
}

function onlyOne({ rows, isOver }: Changed): string {
	if (!isOver) return 'is still under way';
	if (rows.length === 0) return 'ended without a result';
	if (rows[0]?.now !== null) return 'now finds something else';
	return rows.every(({ now }) => now === null) ? 'gives the same to the last digit shown' : 'finds the same with other numbers';
}
