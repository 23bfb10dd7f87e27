import { describe, expect, it } from 'vitest';
import { matchNames } from '#lib/analysis/names/matchNames.ts';
import { nameThreads, threadPath } from './threads.ts';

function threadsOf(tips: string[], species: string[], decisions: { from: string; to: string | null }[] = []) {
	return nameThreads({ tips, species }, matchNames({ tips, species, decisions }).rows);
}

// Expected threads by hand; names are invented.
describe('nameThreads', () => {
	it('ties agreeing names from their places in either list', () => {
		const { threads } = threadsOf(['Rana alba', 'Rana nigra'], ['Rana nigra', 'Rana alba']);
		expect(threads).toEqual([
			{ tip: 1, species: 0, standing: 'agrees' },
			{ tip: 0, species: 1, standing: 'agrees' }
		]);
	});

	it('tells a proposal from a decision, and an open end from one left out', () => {
		const tips = ['Rana pallida', 'Rana tumida', 'Hyla alba'];
		const species = ['Rana palida', 'Bufo sericeus', 'Hyla alba'];
		const before = threadsOf(tips, species);
		expect(before.threads.find(({ species: at }) => at === 0)?.standing).toBe('proposed');
		expect([before.tips[1]?.standing, before.species[1]?.standing]).toEqual(['open', 'open']);
		const after = threadsOf(tips, species, [
			{ from: 'Rana palida', to: 'Rana pallida' },
			{ from: 'Bufo sericeus', to: null }
		]);
		expect(after.threads.find(({ species: at }) => at === 0)?.standing).toBe('decided');
		expect(after.species[1]?.standing).toBe('left-out');
	});

	it('ties a species to each of the tips it could be', () => {
		const { threads, tips } = threadsOf(['Rana alba KU1', 'Rana alba KU2'], ['Rana alba']);
		expect(threads.map(({ tip, standing }) => [tip, standing])).toEqual([
			[0, 'proposed'],
			[1, 'proposed']
		]);
		expect(tips.map(({ standing }) => standing)).toEqual(['proposed', 'proposed']);
	});

	it('draws one thread to a tip that a decision gave to another species than its namesake', () => {
		const { threads, species } = threadsOf(
			['Rana alba', 'Rana nigra'],
			['Rana alba', 'Bufo sericeus', 'Rana nigra'],
			[{ from: 'Bufo sericeus', to: 'Rana alba' }]
		);
		expect(threads.filter(({ tip }) => tip === 0)).toEqual([{ tip: 0, species: 1, standing: 'decided' }]);
		expect(species[0]?.standing).toBe('left-out');
	});
});

describe('threadPath', () => {
	it('leaves and arrives level', () => {
		expect(threadPath({ from: 10, to: 30, width: 100 })).toBe('M0 10C42 10 58 30 100 30');
	});
});
