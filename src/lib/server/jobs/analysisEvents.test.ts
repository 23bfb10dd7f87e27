import { describe, expect, it } from 'vitest';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import { openMailbox, type AnalysisEvent } from './analysisEvents.ts';

const numbers = { total: 9, p: 0.5, asExtreme: 1, monteCarloStandardError: 0, slope: -1, meanAge: 1, meanOverlap: 1 };
const progress = (done: number, newSlopes: number[]): { type: 'progress'; progress: AnalysisProgress } => ({
	type: 'progress',
	progress: { ...numbers, done, newSlopes }
});

describe('openMailbox', () => {
	it('joins the progress between two takes: newest numbers, all slopes in order', async () => {
		const mailbox = openMailbox();
		mailbox.put(progress(1, [10]));
		mailbox.put(progress(2, [20, 21]));
		expect(await mailbox.take(0)).toEqual(progress(2, [10, 20, 21]));
		expect(await mailbox.take(0)).toBeNull();
	});

	it('hands out the last progress before the end', async () => {
		const mailbox = openMailbox();
		mailbox.put(progress(9, [90]));
		mailbox.put({ type: 'finished' });
		expect(await mailbox.take(0)).toEqual(progress(9, [90]));
		expect(await mailbox.take(0)).toEqual({ type: 'finished' } satisfies AnalysisEvent);
	});

	it('wakes a reader who waits', async () => {
		const mailbox = openMailbox();
		const taken = mailbox.take(60_000);
		mailbox.put({ type: 'stopped' });
		expect(await taken).toEqual({ type: 'stopped' });
	});
});
