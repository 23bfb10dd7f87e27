/**
 * Names as a figure prints them: blanks for underscores and, when asked, the genus shortened to its initial, for all of
 * them or for none: where two genera share an initial every name stays whole, since a list half shortened reads as if
 * the short ones were special. A name of one word stays as it is.
 */
export function figureNames(species: readonly string[], abbreviate: boolean): string[] {
	const shown = species.map((name) => name.replaceAll('_', ' ').trim());
	if (!abbreviate) return shown;
	const genusByInitial = new Map<string, string>();
	for (const name of shown) {
		const [genus, epithet] = firstWord(name);
		if (epithet === '') continue;
		const initial = initialOf(genus);
		if ((genusByInitial.get(initial) ?? genus) !== genus) return shown;
		genusByInitial.set(initial, genus);
	}
	const short = shown.map((name) => {
		const [genus, epithet] = firstWord(name);
		return epithet === '' ? name : `${initialOf(genus)}. ${epithet}`;
	});
	return new Set(short).size === short.length ? short : shown;
}

function initialOf(genus: string): string {
	return [...genus][0] ?? '';
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
