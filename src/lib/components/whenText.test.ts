import { describe, expect, it } from 'vitest';
import { whenText } from './whenText.ts';

const now = new Date('2026-12-01T12:00:00Z');

describe('whenText', () => {
	// By hand, from the calendar: 1 December 2026 is the day of `now`, 30 November the day before.
	it('names today and yesterday', () => {
		expect(whenText('2026-12-01T09:05:00Z', { now, timeZone: 'UTC' })).toBe('today 09:05');
		expect(whenText('2026-11-30T23:59:00Z', { now, timeZone: 'UTC' })).toBe('yesterday 23:59');
	});

	it('gives the date and the time within the year, the year beyond it', () => {
		expect(whenText('2026-03-28T14:02:00Z', { now, timeZone: 'UTC' })).toBe('28 Mar 14:02');
		expect(whenText('2025-11-28T14:02:00Z', { now, timeZone: 'UTC' })).toBe('28 Nov 2025');
	});

	// Auckland is 13 hours ahead in December: 11:30 UTC the day before is 00:30 of the same day there.
	it('counts days where the reader is', () => {
		expect(whenText('2026-11-30T11:30:00Z', { now: new Date('2026-12-01T01:00:00Z'), timeZone: 'Pacific/Auckland' })).toBe(
			'today 00:30'
		);
	});
});
