import { describe, expect, it } from 'vitest';
import { headingOf } from './headingOf.ts';

const byKind = { exact: 0, tidied: 0, probable: 0, twice: 0, 'only-in-tree': 0, 'only-in-data': 0 };
const counts = (open: number, pairs: number) => ({ tips: 26, species: 26, pairs, open, byKind });

// Expected headings by hand.
describe('headingOf', () => {
	it('counts what needs a person, in words up to nine', () => {
		expect([1, 2, 12].map((open) => headingOf(counts(open, 20)))).toEqual([
			'One name needs you',
			'Two names need you',
			'12 names need you'
		]);
	});

	it('tells full agreement from names that are settled by leaving some out', () => {
		expect(headingOf(counts(0, 26))).toBe('All 26 names agree');
		expect(headingOf(counts(0, 24))).toBe('Every name is settled');
	});
});
