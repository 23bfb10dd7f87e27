import { describe, expect, it } from 'vitest';
import { marginStations } from './marginStations.ts';

describe('marginStations', () => {
	// By hand: the station of names in study s1 lives at /studies/s1/names.
	it('leads every step to its own page of the study', () => {
		const [station] = marginStations('s1', [{ name: 'names', state: 'needs-you', sentence: '2 names to decide.' }]);
		expect(station).toEqual({
			key: 'names',
			title: 'Names',
			fact: '2 names to decide.',
			state: 'needs-you',
			href: '/studies/s1/names'
		});
	});

	it('keeps the order of the steps', () => {
		const standings = (['reports', 'materials'] as const).map((name) => ({ name, state: 'ready' as const, sentence: '' }));
		expect(marginStations('s', standings).map(({ key }) => key)).toEqual(['reports', 'materials']);
	});
});
