import { describe, expect, it } from 'vitest';
import { remedyOf } from './remedyOf.ts';

describe('remedyOf', () => {
	it.each(['program-failed', 'interrupted-too-often', undefined])('runs the same again after %s', (code) => {
		expect(remedyOf(code, 's')).toEqual({ kind: 'again' });
	});

	it('changes the plan where a choice in it is at fault', () => {
		expect(remedyOf('missing-pairs', 's')).toEqual({ kind: 'plan' });
	});

	it('leads to the page where the data are settled', () => {
		expect(remedyOf('too-few-species', 's')).toMatchObject({ kind: 'settle', href: '/studies/s/names' });
		expect(remedyOf('not-ultrametric', 's')).toMatchObject({ kind: 'settle', href: '/studies/s/materials' });
	});
});
