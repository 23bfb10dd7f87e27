import { describe, expect, it } from 'vitest';
import { progressWords } from './progressWords.ts';

const progress = {
	done: 0,
	total: 19_998,
	asExtreme: 0,
	p: 1,
	monteCarloStandardError: 0,
	slope: -0.1,
	meanAge: 1,
	meanOverlap: 0.5,
	newSlopes: []
};

// The sentences are written by hand: 5,000 of 19,998 is 25.0025 percent.
describe('progressWords', () => {
	it('says how far the run is and p with its error', () => {
		expect(progressWords({ ...progress, done: 5000, p: 0.0123, monteCarloStandardError: 0.0016 })).toBe(
			'25 percent: 5,000 of 19,998 shuffles. p so far 0.012, plus or minus 0.002.'
		);
	});

	it('says no p before the first shuffle', () => {
		expect(progressWords(progress)).toBe('0 percent: 0 of 19,998 shuffles.');
	});
});
