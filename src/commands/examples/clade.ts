/** A dated tree as nested clades. A tip has age 0, a name and no daughters; an inner node has two daughters and no name. */
export type Clade = { readonly ageMa: number; readonly name: string; readonly daughters: readonly Clade[] };

export function tip(name: string): Clade {
	return { ageMa: 0, name, daughters: [] };
}

export function split(ageMa: number, daughters: readonly Clade[]): Clade {
	return { ageMa, name: '', daughters };
}

/** Names of the tips in the order of the tree. */
export function tipNames(clade: Clade): string[] {
	return clade.daughters.length === 0 ? [clade.name] : clade.daughters.flatMap(tipNames);
}

export function innerNodes(clade: Clade): Clade[] {
	return clade.daughters.length === 0 ? [] : [clade, ...clade.daughters.flatMap(innerNodes)];
}

/** The same tree with the smaller daughter first at every node, so that it falls like stairs and the eye can follow it. */
export function ladderised(clade: Clade): Clade {
	const daughters = clade.daughters.map(ladderised);
	const sized = daughters.map((daughter) => ({ daughter, tips: tipNames(daughter).length }));
	sized.sort((left, right) => left.tips - right.tips || left.daughter.ageMa - right.daughter.ageMa);
	return { ...clade, daughters: sized.map(({ daughter }) => daughter) };
}

/** The same tree with names dealt to its tips in their order. */
export function withNames(clade: Clade, names: readonly string[]): Clade {
	const waiting = [...names];
	const named = (part: Clade): Clade =>
		part.daughters.length === 0 ? tip(waiting.shift() ?? '') : { ...part, daughters: part.daughters.map(named) };
	return named(clade);
}

/** The tree of some of its tips; undefined when it has none of them. A node left with one daughter is no node. */
export function prunedTo(clade: Clade, names: ReadonlySet<string>): Clade | undefined {
	if (clade.daughters.length === 0) return names.has(clade.name) ? clade : undefined;
	const kept = clade.daughters.map((daughter) => prunedTo(daughter, names)).filter((part) => part !== undefined);
	return kept.length < 2 ? kept[0] : split(clade.ageMa, kept);
}
