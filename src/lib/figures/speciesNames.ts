/**
 * Names as a figure prints them: blanks for underscores and, when asked, the genus shortened to its initial. A genus
 * keeps its full name when another genus of the figure has the same initial, and a name of one word stays whole.
 */
export function figureNames(species: readonly string[], abbreviate: boolean): string[] {
	const shown = species.map((name) => name.replaceAll('_', ' ').trim());
	if (!abbreviate) return shown;
	const generaByInitial = new Map<string, Set<string>>();
	for (const name of shown) {
		const [genus, epithet] = firstWord(name);
		if (epithet === '') continue;
		const initial = [...genus][0] ?? '';
		generaByInitial.set(initial, (generaByInitial.get(initial) ?? new Set()).add(genus));
	}
	const short = shown.map((name) => {
		const [genus, epithet] = firstWord(name);
		const initial = [...genus][0] ?? '';
		const unambiguous = epithet !== '' && (generaByInitial.get(initial)?.size ?? 0) === 1;
		return unambiguous ? `${initial}. ${epithet}` : name;
	});
	return new Set(short).size === short.length ? short : shown;
}

/** A clade is called by its first and last species; without the genus where every name of the figure has the same one. */
export function spanName(species: readonly string[], first: number, last: number): string {
	const shown = species.map((name) => name.replaceAll('_', ' ').trim());
	const genera = new Set(shown.map((name) => firstWord(name)[0]));
	const oneGenus = genera.size === 1 && shown.every((name) => firstWord(name)[1] !== '');
	const names = oneGenus ? shown.map((name) => firstWord(name)[1]) : figureNames(species, true);
	const from = names[first] ?? '';
	const to = names[last] ?? '';
	return first === last ? from : `${from}–${to}`;
}

function firstWord(name: string): [genus: string, rest: string] {
	const blank = name.indexOf(' ');
	return blank < 0 ? [name, ''] : [name.slice(0, blank), name.slice(blank + 1)];
}
