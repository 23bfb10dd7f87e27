import { describe, expect, it } from 'vitest';
import { aboutTreeForm } from '#lib/contracts/materialForms.ts';
import { NOTHING_KNOWN } from '#lib/contracts/treeAbout.ts';
import { aboutTreeWords } from './aboutTreeWords.ts';

describe('aboutTreeWords', () => {
	it('asks when nothing is known, and tells what is', () => {
		expect(aboutTreeWords(NOTHING_KNOWN)).toMatch(/^Say what only its author knows/);
		const about = {
			...NOTHING_KNOWN,
			speciesInClade: 31,
			placement: 'some-placed' as const,
			placedTips: ['A', 'B'],
			source: 'doi:10.1/x'
		};
		expect(aboutTreeWords(about)).toBe('31 living species in the clade · 2 tips placed by taxonomy · doi:10.1/x');
	});
});

describe('aboutTreeForm', () => {
	const typed = {
		material: 'trees:t1',
		speciesInClade: '31',
		placement: 'some-placed',
		placedTips: 'A\n\n B \nA',
		calibration: '',
		source: ''
	};

	it('reads one placed tip a line, each once, and only when some were placed', () => {
		expect(aboutTreeForm.parse(typed).about).toEqual({
			...NOTHING_KNOWN,
			speciesInClade: 31,
			placement: 'some-placed',
			placedTips: ['A', 'B']
		});
		expect(aboutTreeForm.parse({ ...typed, placement: 'sequences' }).about.placedTips).toEqual([]);
	});

	it('says what a number of species is', () => {
		const parsed = aboutTreeForm.safeParse({ ...typed, speciesInClade: 'many' });
		expect(parsed.error?.issues[0]?.message).toContain('a whole number, such as 31');
	});
});
