import { tipNames, type Clade } from './clade.ts';

/** Newick with blanks of the names written as underscores. Lengths are differences of rounded ages: tips end level to the last digit. */
export function newickText(tree: Clade, decimals: number, labelOf = underscored): string {
	const write = (clade: Clade): string =>
		clade.daughters.length === 0
			? labelOf(clade.name)
			: `(${clade.daughters.map((daughter) => `${write(daughter)}:${branch(clade, daughter, decimals)}`).join(',')})`;
	return `${write(tree)};`;
}

/** A NEXUS file of rooted trees on one set of tips, numbered through TRANSLATE in the order of the first tree. */
export function nexusText(trees: readonly Clade[], decimals: number): string {
	const names = trees[0] === undefined ? [] : tipNames(trees[0]).sort();
	const numbers = new Map(names.map((name, index) => [name, String(index + 1)]));
	const translate = names.map((name, index) => `\t\t${index + 1} ${underscored(name)}`).join(',\n');
	const lines = trees.map(
		(tree, index) => `\tTREE sample_${index + 1} = [&R] ${newickText(tree, decimals, (name) => numbers.get(name) ?? name)}`
	);
	return `#NEXUS\n\nBEGIN TREES;\n\tTRANSLATE\n${translate}\n\t;\n${lines.join('\n')}\nEND;\n`;
}

export function underscored(name: string): string {
	return name.replaceAll(' ', '_');
}

function branch(above: Clade, below: Clade, decimals: number): string {
	return String(Number((above.ageMa - below.ageMa).toFixed(decimals)));
}
