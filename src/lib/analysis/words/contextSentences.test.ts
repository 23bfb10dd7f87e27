import { describe, expect, it } from 'vitest';
import type { PlanContext } from '#lib/contracts/planContext.ts';
import { contextSentences } from './contextSentences.ts';

const untouched: PlanContext = { opened: null, openedByOthers: 0, analysedBefore: 0, lastAnalysed: null };

// The sentences are written out by hand: what a reader must be told before believing that the question came first.
describe('contextSentences', () => {
	it('says that nothing was seen here, and claims nothing of elsewhere', () => {
		expect(contextSentences(untouched, 'reader')).toEqual([
			'The author of the plan had not opened this matrix here before the plan was written.',
			'No analysis of it had been run here.'
		]);
	});

	it('tells the person at the plan when they opened the matrix', () => {
		const context = { ...untouched, opened: { at: '2026-05-03T14:02:59.000Z', by: 'page' as const } };
		expect(contextSentences(context, 'writer')[0]).toBe(
			'You opened this matrix on 3 May 2026, 14:02 UTC, before this plan was written.'
		);
	});

	it.each([
		['brought', 'saw this matrix when bringing it'],
		['file', 'downloaded this matrix'],
		['script', 'read this matrix through the API']
	] as const)('tells how it was seen: %s', (by, words) => {
		const context = { ...untouched, opened: { at: '2026-12-31T00:00:00.000Z', by } };
		expect(contextSentences(context, 'reader')[0]).toBe(
			`The author of the plan ${words} on 31 December 2026, 00:00 UTC, before the plan was written.`
		);
	});

	it('counts other people and the analyses of before', () => {
		const seen = { ...untouched, openedByOthers: 2, analysedBefore: 3, lastAnalysed: '2026-05-04T09:05:00.000Z' };
		expect(contextSentences(seen, 'writer').slice(1)).toEqual([
			'2 other people have seen it here.',
			'It was analysed here before: 3 analyses, the last on 4 May 2026, 09:05 UTC.'
		]);
		const once = { ...seen, openedByOthers: 1, analysedBefore: 1 };
		expect(contextSentences(once, 'writer').slice(1)).toEqual([
			'One other person has seen it here.',
			'It was analysed here before: one analysis, on 4 May 2026, 09:05 UTC.'
		]);
	});
});
