import { describe, expect, it } from 'vitest';
import type { Access } from './access.ts';
import { deletionOf, restorable } from './deletion.ts';

const as = (role: Access['role']): Access => ({ userId: 'me', labId: 'l', studyId: 's', role });
const part = (createdBy: string, isUsed: boolean) => ({ createdBy, isUsed });

// The table of decision 0014, row by row.
describe('deletionOf', () => {
	it('offers everything to a lead', () => {
		expect(deletionOf(as('lead'), part('other', true))).toEqual({ may: true, instead: '' });
	});

	it('offers an analyst what they made while nothing rests on it, and says who can otherwise', () => {
		expect(deletionOf(as('analyst'), part('me', false))).toEqual({ may: true, instead: '' });
		expect(deletionOf(as('analyst'), part('me', true))).toMatchObject({
			may: false,
			instead: expect.stringContaining('rests on it')
		});
		expect(deletionOf(as('analyst'), part('other', false))).toMatchObject({
			may: false,
			instead: expect.stringContaining('Whoever made it')
		});
	});

	it.each(['reader', 'visitor', 'system'] as const)('offers and explains nothing to a %s', (role) => {
		expect(deletionOf(as(role), part('me', false))).toEqual({ may: false, instead: '' });
	});
});

describe('restorable', () => {
	it('lists for an analyst what they made, for a lead everything, for others nothing', () => {
		const gone = [{ createdBy: 'me' }, { createdBy: 'other' }];
		expect(restorable(as('analyst'), gone)).toEqual([{ createdBy: 'me' }]);
		expect(restorable(as('lead'), gone)).toEqual(gone);
		expect(restorable(as('reader'), gone)).toEqual([]);
		expect(restorable(as('visitor'), gone)).toEqual([]);
	});
});
