import { describe, expect, it } from 'vitest';
import { changeReasons, changeRows, changeSummary, type Told } from './changeTable.ts';

const old: Told = {
	...{ treeSetId: 't1', overlapRunId: 'r1', tree: { label: 'summary tree' }, run: { label: 'D' }, decisions: [] },
	plan: { covariates: [], signal: null },
	headline: { title: 'Overlap falls', species: 26 },
	figures: { slope: '−0.0163 per Myr', p: '= 0.0016', within: '= 0.032' }
};
const rowOf = (rows: ReturnType<typeof changeRows>, term: string) => rows.find((row) => row.term === term);

// By hand: each case changes one thing of two equal analyses.
describe('changeRows', () => {
	it('tells every figure before and now, and says what is as before', () => {
		const now = { ...old, figures: { slope: '−0.0163 per Myr', p: '≤ 0.00001', within: '= 0.041' } };
		const rows = changeRows(old, now);
		expect(rows.map(({ term }) => term)).toEqual(['Finding', 'Slope', 'p', 'p within the deepest split', 'Species']);
		expect(rowOf(rows, 'Slope')).toEqual({ term: 'Slope', before: '−0.0163 per Myr', now: null });
		expect(rowOf(rows, 'p')).toEqual({ term: 'p', before: '0.0016', now: '≤ 0.00001' });
		expect(rowOf(rows, 'p within the deepest split')).toMatchObject({ before: '0.032', now: '0.041' });
	});

	it('tells nothing until both have a result', () => {
		expect(changeRows(old, { ...old, headline: null, figures: null })).toEqual([]);
	});
});

describe('changeReasons', () => {
	it('names the material that was replaced', () => {
		expect(changeReasons(old, { ...old, overlapRunId: 'r2' })).toEqual(['The matrix “D” was replaced.']);
		expect(changeReasons(old, { ...old, treeSetId: 't2', tree: { label: 'new tree' } })).toEqual([
			'The tree “summary tree” was replaced by “new tree”.'
		]);
	});

	it('names what else an analysis ran on', () => {
		expect(changeReasons(old, { ...old, plan: { covariates: ['c2'], signal: null } })).toEqual(['A covariate was replaced.']);
		const table = { covariates: [], signal: { variables: ['warmth'], table: 'n2' } };
		expect(changeReasons(old, { ...old, plan: table })).toEqual(['The table of niche positions was replaced.']);
	});

	it('counts the names whose decision changed, each once', () => {
		const decided = { ...old, decisions: [{ from: 'A b', to: 'A c' }] };
		expect(changeReasons(old, decided)).toEqual(['One decision about a name changed.']);
		expect(changeReasons(decided, { ...old, decisions: [{ from: 'A b', to: null }] })).toEqual([
			'One decision about a name changed.'
		]);
	});

	it('falls back on what is left: a remark settled otherwise', () => {
		expect(changeReasons(old, old)).toEqual([
			'A remark about the tree or the matrix was settled, or what is known of the tree was told, in another way.'
		]);
	});
});

describe('changeSummary', () => {
	const pair = (after: Told, isOver = true) => ({ rows: changeRows(old, after), isOver });
	const other = { ...old, headline: { title: 'Nothing found', species: 26 } };
	const moved = { ...old, headline: { title: 'Overlap falls', species: 25 } };
	const none = { ...old, headline: null, figures: null };

	it('counts what finds something else, other numbers, the same, nothing, and what still runs', () => {
		expect(changeSummary([pair(other), pair(moved), pair(moved), pair(old), pair(none), pair(none, false)])).toBe(
			'6 analyses were run again: 1 now finds something else, 2 find the same with other numbers, ' +
				'1 gives the same to the last digit shown, 1 ended without a result, 1 is still under way.'
		);
	});

	it.each([
		[pair(old), 'gives the same to the last digit shown'],
		[pair(moved), 'finds the same with other numbers'],
		[pair(other), 'now finds something else'],
		[pair(none), 'ended without a result'],
		[pair(none, false), 'is still under way']
	])('says of a single one what became of it', (one, words) => {
		expect(changeSummary([one])).toBe(`One analysis was run again; it ${words}.`);
	});
});
