import type { NameRow } from '#lib/analysis/names/nameMatching.ts';

/** Species of the matrix by how they stand: in use, waiting for a person, or out for good. */
export type SpeciesUse = { readonly species: number; readonly used: number; readonly open: number; readonly leftOut: number };

type Matched = {
	readonly rows: readonly Pick<NameRow, 'species' | 'settled'>[];
	readonly pairs: readonly { readonly species: string }[];
	readonly counts: { readonly species: number };
};

/** A species that is asked about is open even where others claim it; what remains is decided, or cannot be matched any more. */
export function speciesUse({ rows, pairs, counts: { species } }: Matched): SpeciesUse {
	const inUse = new Set(pairs.map((pair) => pair.species));
	const asked = new Set(rows.flatMap((row) => (row.settled || row.species === undefined ? [] : [row.species])));
	const open = [...asked].filter((name) => !inUse.has(name)).length;
	return { species, used: inUse.size, open, leftOut: species - inUse.size - open };
}

/** What the test will use: “7 of 8 species will be used; 1 is open.” */
export function usedWords({ species, used, open, leftOut }: SpeciesUse): string {
	if (used === species) return `All ${figure(species)} species of the matrix will be used.`;
	const rest = [open > 0 ? `${counted(open)} open` : '', leftOut > 0 ? `${counted(leftOut)} left out` : ''];
	return `${figure(used)} of ${figure(species)} species will be used; ${rest.filter((part) => part !== '').join(', ')}.`;
}

const figure = (count: number) => count.toLocaleString('en');
const counted = (count: number) => `${figure(count)} ${count === 1 ? 'is' : 'are'}`;
