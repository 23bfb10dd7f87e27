import { describe, expect, it } from 'vitest';
import { matchNames } from '#lib/analysis/names/matchNames.ts';
import { openNames } from './openNames.ts';

const open = (tips: string[], species: string[], decisions: { from: string; to: string | null }[] = []) =>
	openNames(matchNames({ tips, species, decisions }).rows);
const kinds = (names: ReturnType<typeof openNames>) => names.map(({ kind }) => kind);

// Expected rows by hand; names are invented.
describe('openNames', () => {
	it('asks nothing about names that agree', () => {
		expect(open(['Rana alba', 'Rana_nigra'], ['Rana alba', 'Rana nigra'])).toEqual([]);
	});

	it('puts one species and one tip that are left over together', () => {
		const [row] = open(['Rana alba', 'Rana tumida'], ['Rana alba', 'Bufo sericeus']);
		expect(row).toMatchObject({ kind: 'pair-left-over', species: 'Bufo sericeus', tips: ['Rana tumida'] });
	});

	it('gathers tips without a species in one row, behind the species without a tip', () => {
		const names = open(['Rana alba', 'Rana tumida', 'Hyla montana'], ['Rana alba', 'Bufo sericeus', 'Pelobates fuscus']);
		expect(kinds(names)).toEqual(['only-in-data', 'only-in-data', 'only-in-tree']);
		expect(names[2]?.tips).toEqual(['Rana tumida', 'Hyla montana']);
	});

	it('puts proposals first, with where the spellings differ', () => {
		const names = open(['Rana montana', 'Rana tumida'], ['Bufo sericeus', 'Rana tumidda']);
		expect(kinds(names)).toEqual(['probable', 'pair-left-over']);
		expect(names[0]?.differences).not.toBeNull();
	});

	it('offers the tips of a species that several could be', () => {
		const [row] = open(['Rana alba KU1', 'Rana alba KU2'], ['Rana alba']);
		expect(row).toMatchObject({ kind: 'twice', tips: ['Rana alba KU1', 'Rana alba KU2'], isDecided: false });
	});

	it('tells where two decisions stand in the way of each other', () => {
		const decisions = ['Bufo sericeus', 'Pelobates fuscus'].map((from) => ({ from, to: 'Rana alba' }));
		const names = open(['Rana alba', 'Hyla montana'], ['Bufo sericeus', 'Pelobates fuscus', 'Hyla montana'], decisions);
		expect(names.map(({ kind, isDecided }) => [kind, isDecided])).toEqual([
			['twice', true],
			['twice', true]
		]);
	});
});
