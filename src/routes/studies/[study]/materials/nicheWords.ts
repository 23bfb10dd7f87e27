import type { NicheVariable } from '#lib/overlap/nicheTable.ts';

const ROLE_WORDS = { position: '', breadth: 'breadth', records: 'number of records', 'range-size': 'range size' } as const;

/** The variables of a table by name, with what each tells where that is no position. */
export function nicheFactWords(variables: readonly NicheVariable[]): string[] {
	return variables.map(({ name, role, standardErrors }) => {
		const notes = [ROLE_WORDS[role], standardErrors === null ? '' : 'with standard errors'].filter((note) => note !== '');
		return notes.length === 0 ? name : `${name} (${notes.join(', ')})`;
	});
}
