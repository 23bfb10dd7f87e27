import { describe, expect, it } from 'vitest';
import { moreShufflesOffer } from './moreShufflesOffer.ts';

describe('moreShufflesOffer', () => {
	it('says that p is at its floor, and offers ten times as many', () => {
		const floor = { exact: false, count: 9_999, asExtreme: 0, interval: [0, 0.000369] as const };
		expect(moreShufflesOffer(floor, 0.05)).toEqual({
			shuffles: 99_999,
			why: 'None of 9,999 shuffles was as extreme: p is as small as they can tell.'
		});
	});

	it('says between which values p stands when they hold the level', () => {
		const open = { exact: false, count: 999, asExtreme: 49, interval: [0.036, 0.064] as const };
		const offer = moreShufflesOffer(open, 0.05);
		expect(offer?.shuffles).toBe(9_999);
		expect(offer?.why).toBe('999 shuffles leave p open around the level 0.05: its 95 % interval is 0.036 to 0.064.');
	});

	it('offers nothing where p is settled', () => {
		expect(moreShufflesOffer({ exact: false, count: 9_999, asExtreme: 20, interval: [0.0012, 0.0031] }, 0.05)).toBeNull();
		expect(moreShufflesOffer({ exact: true, count: 24, asExtreme: 2, interval: null }, 0.05)).toBeNull();
	});
});
