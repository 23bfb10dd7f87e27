import { describe, expect, it } from 'vitest';
import type { Station, StationState } from '#lib/contracts/station.ts';
import { nextAction } from './nextAction.ts';

const KEYS = ['materials', 'names', 'overlaps', 'analyses', 'reports'] as const;

function standing(states: Partial<Record<Station['key'], StationState>>) {
	return KEYS.map((key) => ({ key, state: states[key] ?? ('ready' as const), href: `/studies/s/${key}` }));
}

// The expected words and addresses are written by hand from the rule: one action, on the first step that needs someone.
describe('nextAction', () => {
	it('asks for a tree in an empty study', () => {
		const all = Object.fromEntries(KEYS.map((key) => [key, 'not-started' as const]));
		expect(nextAction(standing(all), null)).toEqual({ text: 'Paste a tree', href: '/studies/s/materials' });
	});

	it('takes the first step that needs somebody', () => {
		expect(nextAction(standing({ names: 'needs-you', analyses: 'out-of-date' }), null)).toEqual({
			text: 'Settle the names',
			href: '/studies/s/names'
		});
	});

	it('leads a missing matrix to the materials', () => {
		expect(nextAction(standing({ overlaps: 'not-started' }), null)?.href).toBe('/studies/s/materials');
	});

	it('saves a report from the newest finished analysis', () => {
		expect(nextAction(standing({ reports: 'not-started' }), 'a1')).toEqual({
			text: 'Save a report',
			href: '/studies/s/analyses/a1'
		});
	});

	it('plans a test where a plan is written', () => {
		const next = nextAction(standing({ analyses: 'not-started', reports: 'not-started' }), null);
		expect(next).toEqual({ text: 'Plan the test', href: '/studies/s/analyses/new' });
	});

	it('asks for nothing when all is ready', () => {
		expect(nextAction(standing({}), 'a1')).toBeNull();
	});
});
